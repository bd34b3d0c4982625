import type { Series, SeriesMap } from '$lib/model/series';
import { SIGNALS, signalOf, type SeriesId } from '$lib/model/signals';
import { lastAtOrBefore } from './search';

/** How long an analogue change-of-value record stands, ms: 15 min [ours]. */
const ANALOGUE_HOLD = 900_000;

/** Signals whose change-of-value records stand until the next one. */
function standsUntilNext(id: SeriesId): boolean {
	const key = signalOf(id);
	const { form } = SIGNALS[key];
	return form === 'binary' || form === 'counter' || key === 'waterSetpoint' || key === 'demand';
}

/**
 * The value in force at an instant. Interval logging: the last reading, no older than `within` seconds.
 * Change-of-value: the last record, which a blank record ends; status, command and setpoint stand until the next,
 * analogue values 15 min. Never interpolated. @returns NaN for no value
 */
export function valueInForce(id: SeriesId, series: Series, at: number, within: number): number {
	const i = lastAtOrBefore(series.t, at);
	if (i < 0) return NaN;
	const age = at - (series.t[i] ?? NaN);
	if (series.logging === 'change') return standsUntilNext(id) || age <= ANALOGUE_HOLD ? (series.v[i] ?? NaN) : NaN;
	for (let j = i; j >= 0 && at - (series.t[j] ?? NaN) <= within * 1000; j--) {
		const v = series.v[j] ?? NaN;
		if (!Number.isNaN(v)) return v;
	}
	return NaN;
}

/**
 * Change-of-value series laid on given rising instants by their hold rule, so that windows and sums of two signals can
 * be read row by row. Interval series pass through untouched. O(rows + instants) a series.
 */
export function expandHeld(map: SeriesMap, instants: Float64Array): SeriesMap {
	const out: SeriesMap = {};
	for (const [id, series] of Object.entries(map) as [SeriesId, Series][]) {
		out[id] = series.logging === 'change' && id !== 'running' ? expand(id, series, instants) : series;
	}
	return out;
}

function expand(id: SeriesId, series: Series, instants: Float64Array): Series {
	const stands = standsUntilNext(id);
	const v = new Float64Array(instants.length).fill(NaN);
	let j = -1;
	for (let i = 0; i < instants.length; i++) {
		const at = instants[i] ?? NaN;
		while (j + 1 < series.t.length && (series.t[j + 1] ?? Infinity) <= at) j++;
		if (j >= 0 && (stands || at - (series.t[j] ?? NaN) <= ANALOGUE_HOLD)) v[i] = series.v[j] ?? NaN;
	}
	return { ...series, t: instants, v, logging: 'interval' };
}

/**
 * The instants change-of-value records are laid on, ms, rising: 5 s from two minutes before a start to 25 min after it
 * and a minute to either side of its stop, 60 s while it runs, 300 s over everything [ours].
 */
export function holdInstants(from: number, to: number, runs: readonly { from: number; to: number }[]): Float64Array {
	const instants: number[] = [];
	const walk = (first: number, last: number, step: number) => {
		for (let at = first; at <= last; at += step) if (at >= from && at <= to) instants.push(at);
	};
	walk(from, to, 300_000);
	for (const run of runs) {
		walk(run.from - 120_000, Math.min(run.from + 1_500_000, run.to + 60_000), 5000);
		walk(run.from, run.to, 60_000);
		walk(run.to - 60_000, run.to + 60_000, 5000);
	}
	instants.push(to);
	const sorted = Float64Array.from(instants).sort();
	return sorted.filter((value, i) => i === 0 || value > (sorted[i - 1] ?? -Infinity));
}
