import type { CircuitInput } from '$lib/model/circuit-input';
import type { SeriesMap } from '$lib/model/series';
import type { SeriesId } from '$lib/model/signals';
import { DEFAULT_LIMITS } from '$lib/model/unit';

/** Monday 2 June 2025, 00:00 UTC: an arbitrary midnight for invented logs. */
export const MIDNIGHT = Date.UTC(2025, 5, 2);

/** A run of an invented log, seconds from midnight; `stop` is the instant it really stops. */
export type InventedRun = { start: number; stop: number };

/** What a signal is at `t` s from midnight, `since` s from the start of the run it lies in (NaN while off). */
export type Shape = (t: number, since: number) => number;

/**
 * Rows every `spacing` s from `from` to `to` (s from midnight) with `running` and any further signals, all on one `t`
 * array. A row is running when its instant lies in a run: start ≤ t < stop.
 */
export function inventedLog(
	runs: readonly InventedRun[],
	spacing: number,
	from: number,
	to: number,
	shapes: Partial<Record<SeriesId, Shape>> = {}
): SeriesMap {
	const rows = Math.floor((to - from) / spacing) + 1;
	const t = Float64Array.from({ length: rows }, (_, i) => MIDNIGHT + (from + i * spacing) * 1000);
	const since = Float64Array.from(t, (at) => {
		const s = (at - MIDNIGHT) / 1000;
		const run = runs.find((r) => s >= r.start && s < r.stop);
		return run === undefined ? NaN : s - run.start;
	});
	const map: SeriesMap = {
		running: { t, v: since.map((s) => (Number.isNaN(s) ? 0 : 1)), logging: 'interval' }
	};
	for (const [id, shape] of Object.entries(shapes) as [SeriesId, Shape][]) {
		const v = Float64Array.from(t, (at, i) => shape((at - MIDNIGHT) / 1000, since[i] ?? NaN));
		map[id] = { t, v, logging: 'interval' };
	}
	return map;
}

/** A circuit input around series, everything else neutral. */
export function inventedInput(series: SeriesMap, more: Partial<CircuitInput> = {}): CircuitInput {
	return {
		circuit: '1',
		series,
		texts: {},
		events: [],
		nature: {},
		refrigerant: 'R-134a',
		timeZone: 'UTC',
		limits: DEFAULT_LIMITS,
		visits: [],
		tripWords: [],
		corrections: [],
		others: [],
		...more
	};
}
