import type { Series } from '$lib/model/series';
import type { DerivedKey, SeriesId } from '$lib/model/signals';
import { median, medianDeviation } from '../series/numbers';
import { localSpacing } from '../series/spacing';
import { nearestReading } from '../series/window';

export type WatchedSignal = SeriesId | DerivedKey;

/** A band over elapsed time: `t` in s from the start, `low` and `high` in stored units, NaN where it cannot be had. */
export type Band = { signal: WatchedSignal; t: number[]; low: number[]; high: number[] };

/** Fewer starts than this at one instant make no band (method.md: at least 5 matched held starts). */
export const LEAST_STARTS = 5;
const WIDTH = 3;

/** A signal's value near each elapsed time, s, of a start that ran until `until` (ms); NaN where nothing fresh was read. */
export function elapsedValues(series: Series, startedAt: number, until: number, elapsed: readonly number[]): number[] {
	return elapsed.map((s) => {
		const at = startedAt + s * 1000;
		if (at > until) return NaN;
		const spacing = localSpacing(series, at) ?? 0;
		const near = nearestReading(series, at, spacing);
		return near === null || near.at < startedAt || near.at > until ? NaN : near.value;
	});
}

/**
 * The held starts' band of a signal: median ± max(3 × MAD, floor) over the starts with a reading at that elapsed time,
 * five at least. `rows` holds one array of values a start, in step with `elapsed` (s). The floor keeps a band of nearly
 * equal starts wider than the sensor's own noise and step.
 */
export function bandOf(
	signal: WatchedSignal,
	rows: readonly (readonly number[])[],
	elapsed: readonly number[],
	floor: number
): Band {
	const low: number[] = [];
	const high: number[] = [];
	elapsed.forEach((_, i) => {
		const values = rows.map((row) => row[i] ?? NaN).filter((v) => !Number.isNaN(v));
		const middle = values.length >= LEAST_STARTS ? median(values) : null;
		const half = Math.max(WIDTH * (medianDeviation(values) ?? 0), floor);
		low.push(middle === null ? NaN : middle - half);
		high.push(middle === null ? NaN : middle + half);
	});
	return { signal, t: [...elapsed], low, high };
}

export type Departure = {
	signal: WatchedSignal;
	atSeconds: number;
	errorSeconds: number;
	direction: 'above' | 'below';
};

/**
 * The first time a signal is outside its band, on one side, for two samples running. null when it never is.
 * `lag` is the sensor's own, s with its error: the departure is dated back by it. The error adds the sampling.
 */
export function departureOf(
	band: Band,
	values: readonly number[],
	spacing: number,
	lag: { seconds: number; error: number }
): Departure | null {
	let side = 0;
	let since = NaN;
	for (let i = 0; i < band.t.length; i++) {
		const v = values[i] ?? NaN;
		const low = band.low[i] ?? NaN;
		const high = band.high[i] ?? NaN;
		if (Number.isNaN(v) || Number.isNaN(low)) continue;
		const now = v > high ? 1 : v < low ? -1 : 0;
		if (now !== 0 && now === side) {
			const atSeconds = Math.max(0, since - lag.seconds);
			const direction = now > 0 ? ('above' as const) : ('below' as const);
			return { signal: band.signal, atSeconds, errorSeconds: spacing + lag.error, direction };
		}
		side = now;
		since = band.t[i] ?? NaN;
	}
	return null;
}
