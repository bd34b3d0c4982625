import type { CircuitInput } from '$lib/model/circuit-input';
import type { Interval, Series, SeriesMap } from '$lib/model/series';
import type { DerivedKey, SeriesId } from '$lib/model/signals';
import { limitAt, type LimitKey } from '$lib/model/unit';
import { deriveSeries, saturationsOf, type Saturations } from './series/derived';
import { expandHeld, holdInstants, valueInForce } from './series/hold';
import { sampledQuantile } from './series/numbers';
import { hasReadings, readingsWithin } from './series/window';
import { ratedCurrent, type RunningReadings } from './starts/running';
import { findRuns, type Run, type RunQuestions } from './starts/runs';

/** A circuit's log made ready: runs found, change-of-value columns laid out, derived quantities on demand. */
export type Circuit = {
	input: CircuitInput;
	running: RunningReadings;
	runs: Run[];
	/** As logged, change-of-value columns laid on common instants. */
	map: SeriesMap;
	saturations: Saturations;
	/** Readings of a signal or derived quantity; undefined when it has none. */
	trace: (key: SeriesId | DerivedKey) => Series | undefined;
	/** A limit's value in force at an instant, or null. */
	limit: (key: LimitKey, at: number) => number | null;
	logFrom: number;
	logTo: number;
	/** Current that counts as rated, or null. */
	rated: number | null;
	/** Least capacity it runs at: the unit's field, else the 2nd percentile of running capacity; null when not logged. */
	leastCapacity: number | null;
};

const DERIVABLE: ReadonlySet<string> = new Set<DerivedKey>([
	'superheat',
	'dischargeSuperheat',
	'subcooling',
	'evapApproach',
	'condApproach',
	'margin',
	'lift',
	'systemDelta',
	'oilNet',
	'evapDelta',
	'duty'
]);

/** Makes a circuit's log ready for the figures. O(rows × signals). */
export function prepareCircuit(
	input: CircuitInput,
	running: RunningReadings,
	tripRecordedIn: RunQuestions['tripRecordedIn']
): Circuit {
	const logged = saturationsOf(input.series, input.refrigerant);
	const runs = findRuns(running, {
		tripRecordedIn,
		sameRunAcross: (gap) => sameRunAcross(input.series, logged, gap)
	});
	const [logFrom, logTo] = extent(input.series, running);
	const map = heldMap(input.series, runs, logFrom, logTo);
	const saturations = map === input.series ? logged : saturationsOf(map, input.refrigerant);
	return {
		input,
		running,
		runs,
		map,
		saturations,
		trace: tracer(map, saturations, input),
		limit: (key, at) => limitAt(input.limits, key, at)?.value ?? null,
		logFrom,
		logTo,
		rated: hasReadings(map.motorCurrent) ? ratedCurrent(map.motorCurrent, input.nature, map.running) : null,
		leastCapacity: input.nature.minCapacity ?? leastCapacity(map.capacity, runs)
	};
}

function extent(map: SeriesMap, running: RunningReadings): [number, number] {
	let from = running.t[0] ?? 0;
	let to = running.t.at(-1) ?? 0;
	if (running.logging === 'interval') return [from, to];
	for (const series of Object.values(map)) {
		from = Math.min(from, series.t[0] ?? from);
		to = Math.max(to, series.t.at(-1) ?? to);
	}
	return [from, to];
}

function heldMap(map: SeriesMap, runs: readonly Run[], from: number, to: number): SeriesMap {
	const changing = Object.entries(map).some(([id, series]) => id !== 'running' && series.logging === 'change');
	if (!changing) return map;
	return expandHeld(
		map,
		holdInstants(
			from,
			to,
			runs.map((run) => ({ from: run.startedAt, to: run.endedAt ?? to }))
		)
	);
}

function tracer(map: SeriesMap, saturations: Saturations, input: CircuitInput): Circuit['trace'] {
	const known = new Map<string, Series | undefined>();
	return (key) => {
		if (known.has(key)) return known.get(key);
		let series: Series | undefined;
		if (key === 'evapSaturation') series = saturations.evap;
		else if (key === 'condSaturation') series = saturations.cond;
		else if (DERIVABLE.has(key)) series = deriveSeries(key as DerivedKey, map, saturations, input.nature);
		else series = map[key as SeriesId];
		const kept = hasReadings(series) ? series : undefined;
		known.set(key, kept);
		return kept;
	};
}

function leastCapacity(capacity: Series | undefined, runs: readonly Run[]): number | null {
	if (!hasReadings(capacity)) return null;
	const values: number[] = [];
	for (const run of runs) {
		// What it loads to in the first 45 s is the slide on its way, not where it can stay.
		for (const v of readingsWithin(capacity, run.startedAt + 45_000, run.lastOn - 30_000).v) values.push(v);
	}
	return sampledQuantile(values, 0.02);
}

/** A hole over six hours may hide a whole rest when no counter speaks [ours]. */
const LONGEST_HOLE = 21_600_000;

/**
 * One run with a hole, or two runs? A start counter that moved tells. Otherwise a cold signature: the lift fell under
 * half, the discharge fell by 15 K, or the oil by 10 K across the gap [ours].
 */
function sameRunAcross(map: SeriesMap, saturations: Saturations, gap: Interval): boolean {
	const at = (id: SeriesId, series: Series | undefined, when: number) =>
		series === undefined ? NaN : valueInForce(id, series, when, 120);
	const before = (id: SeriesId, series: Series | undefined) => at(id, series, gap.from);
	const after = (id: SeriesId, series: Series | undefined) => at(id, series, gap.to);
	const counted = after('startsCounter', map.startsCounter) - before('startsCounter', map.startsCounter);
	if (!Number.isNaN(counted)) return counted === 0;
	if (gap.to - gap.from > LONGEST_HOLE) return false;
	const { evap, cond } = saturations;
	const liftBefore = before('condSaturation', cond) - before('evapSaturation', evap);
	const liftAfter = after('condSaturation', cond) - after('evapSaturation', evap);
	const fell = (id: SeriesId) => before(id, map[id]) - after(id, map[id]);
	return !(liftAfter < 0.5 * liftBefore || fell('dischargeTemp') > 15 || fell('oilTemp') > 10);
}
