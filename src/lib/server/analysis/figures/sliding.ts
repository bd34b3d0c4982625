import { firstAtOrAfter, lastAtOrBefore } from '../series/search';
import type { Readings } from '../series/window';

/** Least-squares slope (a second), mean and deviation over any stretch of a signal's readings, O(log n) after one pass. */
export type Sliding = {
	readings: Readings;
	/** Over reading indices `from` ≤ i < `to`; `deviation` about the mean. null with fewer than two, or no spread in time */
	fit: (from: number, to: number) => Fit | null;
	/** Over instants `from` to `to`, ms, both inclusive, which the readings must cover to `share` of its length. */
	fitWithin: (from: number, to: number, share: number) => Fit | null;
	/** The most seen at or before an instant, ms; −Infinity before the first reading. */
	mostBefore: (at: number) => number;
};

export type Fit = { slope: number; mean: number; deviation: number };

/** Running sums of time (s from the first reading), value and their products. */
export function sliding(readings: Readings): Sliding {
	const n = readings.t.length;
	const t0 = readings.t[0] ?? 0;
	const v0 = readings.v[0] ?? 0;
	const sums = { t: prefix(n), v: prefix(n), tt: prefix(n), tv: prefix(n), vv: prefix(n) };
	const most = new Float64Array(n);
	for (let i = 0; i < n; i++) {
		const t = ((readings.t[i] ?? NaN) - t0) / 1000;
		const v = (readings.v[i] ?? NaN) - v0;
		sums.t[i + 1] = (sums.t[i] ?? 0) + t;
		sums.v[i + 1] = (sums.v[i] ?? 0) + v;
		sums.tt[i + 1] = (sums.tt[i] ?? 0) + t * t;
		sums.tv[i + 1] = (sums.tv[i] ?? 0) + t * v;
		sums.vv[i + 1] = (sums.vv[i] ?? 0) + v * v;
		most[i] = Math.max(most[i - 1] ?? -Infinity, readings.v[i] ?? NaN);
	}
	const part = (array: Float64Array, from: number, to: number) => (array[to] ?? 0) - (array[from] ?? 0);
	const fit: Sliding['fit'] = (from, to) => {
		const count = to - from;
		if (count < 2) return null;
		const t = part(sums.t, from, to);
		const v = part(sums.v, from, to);
		const spread = part(sums.tt, from, to) - (t * t) / count;
		if (!(spread > 1e-6)) return null;
		const slope = (part(sums.tv, from, to) - (t * v) / count) / spread;
		const variance = Math.max(0, part(sums.vv, from, to) - (v * v) / count) / count;
		return { slope, mean: v0 + v / count, deviation: Math.sqrt(variance) };
	};
	const fitWithin: Sliding['fitWithin'] = (from, to, share) => {
		const first = firstAtOrAfter(readings.t, from);
		const end = lastAtOrBefore(readings.t, to) + 1;
		const covered = (readings.t[end - 1] ?? NaN) - (readings.t[first] ?? NaN);
		return covered >= share * (to - from) ? fit(first, end) : null;
	};
	return { readings, fit, fitWithin, mostBefore: (at) => most[lastAtOrBefore(readings.t, at)] ?? -Infinity };
}

function prefix(n: number): Float64Array {
	return new Float64Array(n + 1);
}

/** Stretches of time, ms, that cover every window of `width` ms, stepped by `step`, for which `good(from, to)` holds. */
export function goodStretches(
	from: number,
	to: number,
	width: number,
	step: number,
	good: (from: number, to: number) => boolean
): { from: number; to: number }[] {
	const found: { from: number; to: number }[] = [];
	for (let at = from; at + width <= to; at += step) {
		if (!good(at, at + width)) continue;
		const last = found.at(-1);
		// Windows of one unbroken row of steps belong together; a missed step parts them.
		if (last !== undefined && last.to >= at + width - step) last.to = at + width;
		else found.push({ from: at, to: at + width });
	}
	return found;
}
