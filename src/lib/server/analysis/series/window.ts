import type { Series } from '$lib/model/series';
import { firstAtOrAfter, lastAtOrBefore } from './search';

/** Readings of a stretch: times in ms UTC, values without blanks. */
export type Readings = { t: Float64Array; v: Float64Array };

/**
 * The readings from `from` to `to` (ms, both inclusive), blanks left out.
 * @throws RangeError when `to` or `from` is NaN
 */
export function readingsWithin(series: Series, from: number, to: number): Readings {
	if (Number.isNaN(from) || Number.isNaN(to)) throw new RangeError('a window needs two instants');
	const first = firstAtOrAfter(series.t, from);
	const end = lastAtOrBefore(series.t, to) + 1;
	const size = Math.max(end - first, 0);
	const t = new Float64Array(size);
	const v = new Float64Array(size);
	let count = 0;
	for (let i = first; i < end; i++) {
		const value = series.v[i] ?? NaN;
		if (Number.isNaN(value)) continue;
		t[count] = series.t[i] ?? NaN;
		v[count++] = value;
	}
	return { t: t.subarray(0, count), v: v.subarray(0, count) };
}

/** The least (`sign` 1) or most (`sign` −1) reading with its instant, ms. null for no reading */
export function extreme(readings: Readings, sign: 1 | -1): { value: number; at: number } | null {
	let best = -1;
	for (let i = 0; i < readings.v.length; i++) {
		if (best < 0 || sign * (readings.v[i] ?? NaN) < sign * (readings.v[best] ?? NaN)) best = i;
	}
	return best < 0 ? null : { value: readings.v[best] ?? NaN, at: readings.t[best] ?? NaN };
}

/**
 * The reading nearest to an instant, no farther than `within` seconds; the earlier of two equally near.
 * @returns null when there is none
 */
export function nearestReading(series: Series, at: number, within: number): { value: number; at: number } | null {
	const reach = within * 1000;
	let best: { value: number; at: number } | null = null;
	for (let i = firstAtOrAfter(series.t, at - reach); i < series.t.length; i++) {
		const t = series.t[i] ?? NaN;
		if (t > at + reach) break;
		const value = series.v[i] ?? NaN;
		if (!Number.isNaN(value) && (best === null || Math.abs(t - at) < Math.abs(best.at - at))) best = { value, at: t };
	}
	return best;
}

/** The last reading at or before an instant, no older than `within` seconds. null when there is none */
export function lastReading(series: Series, at: number, within: number): { value: number; at: number } | null {
	for (let i = lastAtOrBefore(series.t, at); i >= 0; i--) {
		const t = series.t[i] ?? NaN;
		if (at - t > within * 1000) return null;
		const value = series.v[i] ?? NaN;
		if (!Number.isNaN(value)) return { value, at: t };
	}
	return null;
}

/** Does the series hold at least one reading? */
export function hasReadings(series: Series | undefined): series is Series {
	return series !== undefined && series.v.some((v) => !Number.isNaN(v));
}
