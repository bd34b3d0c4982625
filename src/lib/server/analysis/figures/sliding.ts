import type { Readings } from '../series/window';

/** Least-squares slope (a second) and mean over any stretch of one signal's readings, each in O(1) after one pass. */
export type Sliding = {
	readings: Readings;
	/**
	 * Over reading indices `from` ≤ i < `to`. @returns null with fewer than two readings or no spread in time
	 */
	fit: (from: number, to: number) => { slope: number; mean: number } | null;
};

/** Running sums of time (s from the first reading), value and their products. */
export function sliding(readings: Readings): Sliding {
	const n = readings.t.length;
	const t0 = readings.t[0] ?? 0;
	const v0 = readings.v[0] ?? 0;
	const sums = {
		t: new Float64Array(n + 1),
		v: new Float64Array(n + 1),
		tt: new Float64Array(n + 1),
		tv: new Float64Array(n + 1)
	};
	for (let i = 0; i < n; i++) {
		const t = ((readings.t[i] ?? NaN) - t0) / 1000;
		const v = (readings.v[i] ?? NaN) - v0;
		sums.t[i + 1] = (sums.t[i] ?? 0) + t;
		sums.v[i + 1] = (sums.v[i] ?? 0) + v;
		sums.tt[i + 1] = (sums.tt[i] ?? 0) + t * t;
		sums.tv[i + 1] = (sums.tv[i] ?? 0) + t * v;
	}
	const part = (array: Float64Array, from: number, to: number) => (array[to] ?? 0) - (array[from] ?? 0);
	const fit: Sliding['fit'] = (from, to) => {
		const count = to - from;
		if (count < 2) return null;
		const t = part(sums.t, from, to);
		const v = part(sums.v, from, to);
		const spread = part(sums.tt, from, to) - (t * t) / count;
		if (!(spread > 1e-6)) return null;
		return { slope: (part(sums.tv, from, to) - (t * v) / count) / spread, mean: v0 + v / count };
	};
	return { readings, fit };
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
