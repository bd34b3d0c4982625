import type { CircuitInput } from '$lib/model/circuit-input';
import { DERIVED, SIGNALS, signalOf, type DerivedKey, type SeriesId } from '$lib/model/signals';
import type { StartRecord } from '$lib/model/start';
import { limitAt } from '$lib/model/unit';
import { prepareCircuit, type Circuit } from '../circuit';
import { readRunning } from '../starts/running';
import {
	bandOf,
	departureOf,
	elapsedValues,
	LEAST_STARTS,
	type Band,
	type Departure,
	type WatchedSignal
} from './bands';

export type FirstMoverResult = {
	sentence: string;
	/** Why the order cannot be told; null when it can. */
	cannotTell: string | null;
	heldStarts: number;
	/** End of the start-up bypass, s. */
	fromSeconds: number;
	tripAtSeconds: number | null;
	/** Earliest first. */
	departures: (Departure & { label: string })[];
	bands: Band[];
};

type Lag = { seconds: number; error: number };
const AT_ONCE: Lag = { seconds: 0, error: 0 };
/** Water probes lag by 40 ± 20 s (method.md); probes on pipes and in oil by less [ours]. */
const WATER: Lag = { seconds: 40, error: 20 };
const PROBE: Lag = { seconds: 15, error: 10 };

/** What is watched, its sensor's lag, and the least half-width of its band in stored units [ours]. */
const WATCHED: readonly (readonly [WatchedSignal, Lag, number])[] = [
	['capacity', AT_ONCE, 2],
	['speed', AT_ONCE, 1],
	['motorCurrent', AT_ONCE, 3],
	['evapSaturation', AT_ONCE, 0.5],
	['condSaturation', AT_ONCE, 0.5],
	['lift', AT_ONCE, 0.7],
	['systemDelta', AT_ONCE, 15],
	['oilNet', AT_ONCE, 15],
	['valvePosition', AT_ONCE, 3],
	['superheat', PROBE, 1],
	['dischargeSuperheat', PROBE, 1.5],
	['oilTemp', PROBE, 1],
	['margin', PROBE, 1],
	['evapFlow', AT_ONCE, 1],
	['evapWaterIn', WATER, 0.4],
	['evapWaterOut', WATER, 0.4],
	['condWaterIn', WATER, 0.6]
];

/** A start that is not tripped is followed this long, s. */
const FOLLOWED = 600;
/** Two samples out are needed well before a trip: coarser than a third of the way to it tells no order. */
const COARSE_SHARE = 1 / 3;

/**
 * Which signal left the held starts' band first. Starts are aligned; per signal a band of median ± 3 MAD from at least
 * five matched held starts, from the end of the start-up bypass to the stop; departure = first time outside for two
 * samples, with its error (sampling, and the sensor's lag). Where the errors of the first two overlap the order cannot
 * be told. `heldStarts`: the starts to compare with, see {@link matchedHeld}.
 */
export function firstMoverOf(
	input: CircuitInput,
	start: StartRecord,
	heldStarts: readonly StartRecord[]
): FirstMoverResult {
	const fromSeconds = limitAt(input.limits, 'startBypass', start.startedAt)?.value ?? 0;
	const tripAtSeconds = start.trip === null ? null : (start.trip.at - start.startedAt) / 1000;
	const base = { heldStarts: heldStarts.length, fromSeconds, tripAtSeconds };
	const none = (cannotTell: string): FirstMoverResult => {
		return { ...base, cannotTell, sentence: cannotTell, departures: [], bands: [] };
	};
	if (heldStarts.length < LEAST_STARTS) {
		return none(`Only ${heldStarts.length} held starts to compare with; ${LEAST_STARTS} are needed.`);
	}
	const running = readRunning(input.series, input.nature);
	if (running === null) return none('No column tells when the compressor ran.');
	const circuit = prepareCircuit(input, running, () => false);
	const elapsed = elapsedOf(start, fromSeconds);
	const compared = compare(circuit, start, heldStarts, elapsed);
	const departures = compared
		.flatMap(({ departure }) => (departure === null ? [] : [{ ...departure, label: labelOf(departure.signal) }]))
		.sort((a, b) => a.atSeconds - b.atSeconds);
	const bands = compared.map(({ band }) => band);
	const cannotTell = whyNot(start, departures, tripAtSeconds, bands.length);
	return { ...base, cannotTell, sentence: sentenceOf(departures, cannotTell, tripAtSeconds), departures, bands };
}

/** Elapsed times to compare at, s: one a spacing, from the bypass to the stop. */
function elapsedOf(start: StartRecord, from: number): number[] {
	const stop = start.endedAt === null ? Infinity : (start.endedAt - start.startedAt) / 1000;
	const to = Math.min(stop, FOLLOWED);
	const step = Math.max(1, start.spacingSeconds);
	const elapsed: number[] = [];
	for (let s = Math.ceil(from / step) * step; s < to; s += step) elapsed.push(s);
	return elapsed;
}

function compare(circuit: Circuit, start: StartRecord, held: readonly StartRecord[], elapsed: readonly number[]) {
	const until = (s: StartRecord) => (s.endedAt === null ? circuit.logTo : s.endedAt - 1);
	return WATCHED.flatMap(([signal, lag, floor]) => {
		const series = circuit.trace(signal);
		if (series === undefined) return [];
		const rows = held.map((each) => elapsedValues(series, each.startedAt, until(each), elapsed));
		const band = bandOf(signal, rows, elapsed, Math.max(floor, series.increment ?? 0));
		if (band.low.every(Number.isNaN)) return [];
		const values = elapsedValues(series, start.startedAt, until(start), elapsed);
		return [{ band, departure: departureOf(band, values, start.spacingSeconds, lag) }];
	});
}

function whyNot(
	start: StartRecord,
	departures: readonly Departure[],
	tripAt: number | null,
	compared: number
): string | null {
	if (compared === 0) return 'The log has no signal to compare.';
	if (tripAt !== null && start.spacingSeconds > tripAt * COARSE_SHARE) {
		return `Sampled every ${Math.round(start.spacingSeconds)} s, too coarse to tell an order before the trip.`;
	}
	const [first, second] = departures;
	if (first === undefined) return 'No signal left the held starts’ band.';
	if (second === undefined) return null;
	const apart = second.atSeconds - first.atSeconds;
	return apart > first.errorSeconds + second.errorSeconds ? null : 'Order cannot be told: the errors overlap.';
}

function sentenceOf(
	departures: FirstMoverResult['departures'],
	cannotTell: string | null,
	tripAt: number | null
): string {
	const named = departures
		.slice(0, 4)
		.map((d) => `${d.label} ${d.direction} at ${Math.round(d.atSeconds)} ± ${Math.round(d.errorSeconds)} s`)
		.join(', ');
	const trip = tripAt === null ? '' : `; trip at ${Math.round(tripAt)} s`;
	if (named === '') return cannotTell ?? '';
	const list = `Out of the held starts’ band: ${named}${trip}.`;
	return cannotTell === null ? list : `${cannotTell} ${list}`;
}

function labelOf(signal: WatchedSignal): string {
	return signal in DERIVED ? DERIVED[signal as DerivedKey].label : SIGNALS[signalOf(signal as SeriesId)].label;
}

/** Starts further from the start in question than this are not alike: K of condenser water, K of leaving water [ours]. */
const ALIKE = { condWater: 4, water: 4 };

/**
 * The held starts to compare a start with: not attended, not after a lay-up, of the same rest class, and with condenser
 * and leaving water within 4 K where both are known; the nearest in time first, at most `most`. Where that leaves fewer
 * than five, the conditions are let go before the rest class.
 */
export function matchedHeld(start: StartRecord, starts: readonly StartRecord[], most = 20): StartRecord[] {
	const held = starts.filter((s) => s !== start && s.outcome === 'held' && !s.attended && !s.layUp);
	const sameRest = held.filter((s) => s.firstStart === start.firstStart);
	const near = (key: 'condWaterInAtStart' | 'waterOutAtStart', within: number, other: StartRecord) => {
		const [a, b] = [start.figures[key], other.figures[key]];
		return a === null || b === null || Math.abs(a - b) <= within;
	};
	const alike = sameRest.filter(
		(s) => near('condWaterInAtStart', ALIKE.condWater, s) && near('waterOutAtStart', ALIKE.water, s)
	);
	const chosen = [alike, sameRest, held].find((list) => list.length >= LEAST_STARTS) ?? held;
	return [...chosen]
		.sort((a, b) => Math.abs(a.startedAt - start.startedAt) - Math.abs(b.startedAt - start.startedAt))
		.slice(0, most);
}
