import type { ChangeFact, FieldCheckFact } from '$lib/model/checks';
import type { CircuitInput } from '$lib/model/circuit-input';
import type { UnitSystem } from '$lib/model/quantities';
import type { StartRecord, TripKind } from '$lib/model/start';

/** Everything the suspects of one circuit are judged on. */
export type SuspectEvidence = {
	input: CircuitInput;
	/** Starts of the period, oldest first. */
	starts: readonly StartRecord[];
	checks?: readonly FieldCheckFact[];
	changes?: readonly ChangeFact[];
	/** The person's units, for the sentences. */
	units?: UnitSystem;
};

/** Stops that say nothing about the refrigerating machine. */
const OUTSIDE: ReadonlySet<TripKind> = new Set(['external-interlock', 'refrigerant-detector', 'emergency-stop']);

/** Is this a trip whose cause may lie in the machine or its plant? */
export function isTellingTrip(start: StartRecord): boolean {
	return start.outcome === 'tripped' && !(start.trip && OUTSIDE.has(start.trip.kind));
}

/** Trips that say nothing of the refrigerant: water, supply, a failed sensor, or a condenser too hot. */
const OTHER_SIDE: readonly TripKind[] = [
	'loss-of-water-flow',
	'starter-fault',
	'phase-or-supply',
	'motor-temperature',
	'high-condensing',
	'high-oil-temperature',
	'sensor-or-communication'
];
/** Trips that come of too little pressure difference, with or without a low evaporator. */
const HEAD: readonly TripKind[] = ['oil-flow', 'low-pressure-difference'];

/** Does the trip speak about the low side, or (for the head) about the pressure difference? Trips of no known kind do. */
export function speaksAbout(start: StartRecord, side: 'low-side' | 'head'): boolean {
	const kind = start.trip?.kind;
	if (kind === undefined || OTHER_SIDE.includes(kind)) return kind === undefined;
	return side === 'head' || !HEAD.includes(kind);
}

/** Starts that count: nobody was at the unit and it was no lay-up. */
export function eligibleStarts(starts: readonly StartRecord[]): StartRecord[] {
	return starts.filter((start) => !start.attended && !start.layUp && start.outcome !== 'lost');
}

/** A repair needs this many starts after it before the starts before it stop being the present state [ours]. */
const STARTS_AFTER_CHANGE = 3;

/**
 * The starts that speak for the machine as it is now: those since the last change if at least three are eligible, else
 * all of them. A replaced compressor, controller or sensor always cuts off the history before it.
 */
export function presentStarts(evidence: SuspectEvidence): StartRecord[] {
	const all = eligibleStarts(evidence.starts);
	const changes = [...(evidence.changes ?? [])].sort((a, b) => b.at - a.at);
	const latest = changes[0];
	const newHistory = changes.find((change) => change.newHistory);
	const since = (at: number) => all.filter((start) => start.startedAt >= at);
	if (latest && since(latest.at).length >= STARTS_AFTER_CHANGE) return since(latest.at);
	return newHistory && since(newHistory.at).length > 0 ? since(newHistory.at) : all;
}
