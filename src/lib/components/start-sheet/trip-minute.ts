import type { UnitSystem } from '$lib/model/quantities';
import type { TraceKey } from '$lib/model/signals';
import type { TripKind } from '$lib/model/start';
import { lowerBound } from '$lib/utils/trace-path';
import { type Reading, readTrace } from './read-strip';
import type { StartTraces } from './start-traces';

/** Signals that tell most about a trip of each kind, in the order they are printed (common practice, no source). */
const TELLING: Readonly<Partial<Record<TripKind, readonly TraceKey[]>>> = {
	'low-leaving-water': ['evapWaterOut', 'evapWaterIn', 'evapFlow', 'capacity', 'evapSaturation'],
	'oil-flow': ['oilNet', 'systemDelta', 'oilTemp', 'margin', 'lift'],
	'high-oil-temperature': ['oilTemp', 'margin', 'condSaturation', 'capacity'],
	'high-condensing': ['condSaturation', 'condApproach', 'condWaterIn', 'condAirIn', 'condFlow', 'capacity'],
	'high-discharge-temperature': ['dischargeTemp', 'dischargeSuperheat', 'superheat', 'condSaturation'],
	'loss-of-water-flow': ['evapFlow', 'condFlow', 'evapDelta', 'evapWaterOut'],
	'low-pressure-difference': ['systemDelta', 'lift', 'condWaterIn', 'condSaturation'],
	'motor-temperature': ['windingTemp', 'motorCurrent', 'capacity', 'superheat'],
	'starter-fault': ['motorCurrent', 'power', 'capacity', 'evapSaturation'],
	'phase-or-supply': ['motorCurrent', 'power', 'capacity', 'evapSaturation']
};
const STARVED: readonly TraceKey[] = [
	'evapSaturation',
	'evapWaterOut',
	'capacity',
	'valvePosition',
	'superheat',
	'lift'
];

export type TripMinuteRow = { key: TraceKey; label: string; own: (Reading | null)[]; held: (Reading | null)[] };
export type TripMinute = { seconds: number[]; rows: TripMinuteRow[] };

/**
 * The last stored samples before a trip, of the signals that tell most about its kind, beside the held start at the same
 * elapsed times.
 * @param tripSeconds from the start
 * @param many how many samples
 * @returns null when the log has none of those signals, or no sample before the trip
 */
export function tripMinute(
	main: StartTraces,
	held: StartTraces | null,
	kind: TripKind,
	tripSeconds: number,
	system: UnitSystem,
	air: number,
	many = 6,
	rows = 4
): TripMinute | null {
	const end = lowerBound(main.stops, main.startMs + tripSeconds * 1000 + 1);
	const at = Array.from(main.stops.subarray(Math.max(0, end - many), end));
	const keys = (TELLING[kind] ?? STARVED).filter((key) => main.traces.has(key)).slice(0, rows);
	if (at.length === 0 || keys.length === 0) return null;
	const seconds = at.map((ms) => (ms - main.startMs) / 1000);
	const read = (set: StartTraces | null, key: TraceKey) =>
		seconds.map((s) => (set ? readTrace(set, key, s, system, air) : null));
	return {
		seconds,
		rows: keys.map((key) => ({
			key,
			label: main.traces.get(key)?.label ?? key,
			own: read(main, key),
			held: read(held, key)
		}))
	};
}
