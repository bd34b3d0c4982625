import type { CircuitInput } from '$lib/model/circuit-input';
import type { Series } from '$lib/model/series';
import { type DerivedKey, type SeriesId, type SignalKey, signalOf } from '$lib/model/signals';
import { median } from '../statistics/median';

/** A change-of-value reading of a measured quantity holds this long (method.md, "From log to time base"). */
const ANALOGUE_HOLD_MS = 15 * 60_000;

type Side = 'a' | 'b';
const PARTS: Readonly<Record<Exclude<DerivedKey, 'duty'>, Readonly<Record<Side, SignalKey>>>> = {
	superheat: { a: 'suctionTemp', b: 'evapSaturation' },
	dischargeSuperheat: { a: 'dischargeTemp', b: 'condSaturation' },
	subcooling: { a: 'condSaturation', b: 'liquidTemp' },
	evapApproach: { a: 'evapWaterOut', b: 'evapSaturation' },
	condApproach: { a: 'condSaturation', b: 'condWaterOut' },
	margin: { a: 'oilTemp', b: 'condSaturation' },
	lift: { a: 'condSaturation', b: 'evapSaturation' },
	systemDelta: { a: 'condPressure', b: 'evapPressure' },
	oilNet: { a: 'oilPressure', b: 'evapPressure' },
	evapDelta: { a: 'evapWaterIn', b: 'evapWaterOut' }
};

/** A trace that can be read over windows: a signal, or a difference of two. */
export type Readable = SeriesId | Exclude<DerivedKey, 'duty'>;

/** The signals a trace is made of: itself, or the two it is the difference of. */
export function signalsOf(trace: Readable): SignalKey[] {
	const parts = trace in PARTS ? PARTS[trace as keyof typeof PARTS] : null;
	return parts ? [parts.a, parts.b] : [signalOf(trace as SeriesId)];
}

export type TraceReader = {
	has: (trace: Readable) => boolean;
	/** The signals a trace needs that the log lacks. */
	lacking: (trace: Readable) => SignalKey[];
	series: (id: SeriesId) => Series | undefined;
	/** Finite readings in from…to (both ends in; ms UTC); a held change-of-value reading counts at `from`. */
	values: (id: SeriesId, from: number, to: number) => number[];
	/** Median over from…to; of a derived trace the difference of the parts' medians; null without a reading. */
	median: (trace: Readable, from: number, to: number) => number | null;
	/** Last reading at or before `at`, not older than `withinMs`. */
	last: (trace: Readable, at: number, withinMs: number) => number | null;
};

/** Index of the first instant at or after `at`. */
export function lowerBound(t: Float64Array, at: number): number {
	let low = 0;
	let high = t.length;
	while (low < high) {
		const middle = (low + high) >> 1;
		if ((t[middle] ?? Infinity) < at) low = middle + 1;
		else high = middle;
	}
	return low;
}

function windowValues(series: Series | undefined, from: number, to: number): number[] {
	if (!series) return [];
	const found: number[] = [];
	const first = lowerBound(series.t, from);
	const held = first - 1;
	if (series.logging === 'change' && held >= 0 && (series.t[first] ?? Infinity) > from) {
		const value = series.v[held] ?? NaN;
		if (Number.isFinite(value) && from - (series.t[held] ?? 0) <= ANALOGUE_HOLD_MS) found.push(value);
	}
	for (let i = first; i < series.t.length && (series.t[i] ?? Infinity) <= to; i++) {
		const value = series.v[i] ?? NaN;
		if (Number.isFinite(value)) found.push(value);
	}
	return found;
}

function lastValue(series: Series | undefined, at: number, withinMs: number): number | null {
	if (!series) return null;
	for (let i = lowerBound(series.t, at + 1) - 1; i >= 0; i--) {
		const age = at - (series.t[i] ?? -Infinity);
		if (age > Math.max(withinMs, series.logging === 'change' ? ANALOGUE_HOLD_MS : 0)) return null;
		const value = series.v[i] ?? NaN;
		if (Number.isFinite(value)) return value;
	}
	return null;
}

/**
 * Reads traces of one circuit over windows. Differences are taken between medians of the same window, so that two
 * columns logged at other instants need no interpolation (which method.md forbids).
 * @param series the circuit's series, saturations already worked out where the log has only pressures
 * @param pressures pressures worked out from saturations, read in differences of pressure where none is logged
 */
export function traceReader(
	series: CircuitInput['series'],
	pressures: Partial<Record<SignalKey, Series>> = {}
): TraceReader {
	const partsOf = (trace: Readable) => (trace in PARTS ? PARTS[trace as keyof typeof PARTS] : null);
	const signals = (trace: Readable): SeriesId[] => {
		const parts = partsOf(trace);
		return parts ? [parts.a, parts.b] : [trace as SeriesId];
	};
	const partOf = (trace: Readable, id: SeriesId): Series | undefined => {
		const logged = series[id];
		if (logged?.t.length || partsOf(trace) === null) return logged;
		return pressures[signalOf(id)];
	};
	const lacking = (trace: Readable) =>
		signals(trace)
			.filter((id) => (partOf(trace, id)?.t.length ?? 0) === 0)
			.map(signalOf);
	const both = (trace: Readable, read: (part: Series | undefined) => number | null): number | null => {
		const [a, b] = signals(trace).map((id) => read(partOf(trace, id)));
		if (a === undefined || a === null) return null;
		if (partsOf(trace) === null) return a;
		return b === undefined || b === null ? null : a - b;
	};
	return {
		has: (trace) => lacking(trace).length === 0,
		lacking,
		series: (id) => series[id],
		values: (id, from, to) => windowValues(series[id], from, to),
		median: (trace, from, to) => both(trace, (part) => median(windowValues(part, from, to))),
		last: (trace, at, withinMs) => both(trace, (part) => lastValue(part, at, withinMs))
	};
}
