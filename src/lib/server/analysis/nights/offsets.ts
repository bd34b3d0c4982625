import type { Interval } from '$lib/model/series';
import { limitAt } from '$lib/model/unit';
import type { Circuit } from '../circuit';
import type { WatchedSignal } from '../first-mover/bands';
import { isFlat, offsetStretches, restMedian, waterMoves } from './rest-view';
import type { RestOutcome, RestReading, RestTestKey } from './types';

type Offset = {
	key: RestTestKey;
	/** Value: median(a) − median(b). */
	a: WatchedSignal;
	b: WatchedSignal;
	/** Whose water has to move, or null where none is needed. */
	water: 'evap' | 'cond' | null;
	/** Only a positive offset fails. */
	positiveOnly: boolean;
	/** Never more than shown. */
	shownOnly: boolean;
};

const OFFSETS: readonly Offset[] = [
	{
		key: 'entering-leaving-offset',
		a: 'evapWaterIn',
		b: 'evapWaterOut',
		water: 'evap',
		positiveOnly: false,
		shownOnly: false
	},
	{
		key: 'saturation-leaving-offset',
		a: 'evapSaturation',
		b: 'evapWaterOut',
		water: 'evap',
		positiveOnly: false,
		shownOnly: false
	},
	{
		key: 'suction-saturation-offset',
		a: 'suctionTemp',
		b: 'evapSaturation',
		water: null,
		positiveOnly: false,
		shownOnly: true
	},
	{
		key: 'non-condensables',
		a: 'condSaturation',
		b: 'condWaterIn',
		water: 'cond',
		positiveOnly: true,
		shownOnly: false
	}
];

/** Paired sensors agree within 2 °F; from a log alone an offset speaks only over max(3 °F, 2·√(tol² + tol²)). K */
const TOLERANCE = 2 / 1.8;
const LEAST_CLUE = 3 / 1.8;

/**
 * The resting offsets of one rest, K: a − b over the latest ten minutes in which the compressor has been off for 20 min,
 * both stand still (under 0.1 K/min) and water is proved to move. Passed within the tolerance of paired sensors; failed
 * beyond what a log alone can say; shown between, and where the pump's state is not logged.
 */
export function readOffsets(circuit: Circuit, rest: Interval): RestReading[] {
	return OFFSETS.map((offset) => readOffset(circuit, rest, offset));
}

function readOffset(circuit: Circuit, rest: Interval, offset: Offset): RestReading {
	const not = (why: string): RestReading => {
		return { key: offset.key, result: 'not-testable', value: null, quantity: 'temperatureDifference', why };
	};
	const { nature } = circuit.input;
	if (offset.key === 'non-condensables' && nature.condenser === 'air') return not('The condenser is air-cooled.');
	if (offset.key === 'saturation-leaving-offset' && nature.pumpDownOnStop === true) {
		return not('It pumps down on stopping: no liquid is left to show a saturation.');
	}
	if (circuit.trace(offset.a) === undefined || circuit.trace(offset.b) === undefined) {
		return not('One of the two is not logged.');
	}
	const stretches = offsetStretches(rest);
	if (stretches.length === 0) return not('The rest was shorter than half an hour.');
	let why = 'Neither stood still long enough.';
	for (const stretch of stretches.slice(0, 12)) {
		const moves = offset.water === null ? true : waterMoves(circuit, offset.water, stretch);
		if (moves === false) {
			why = 'The pump was off.';
			continue;
		}
		if (isFlat(circuit, offset.a, stretch) !== true || isFlat(circuit, offset.b, stretch) !== true) continue;
		const [a, b] = [restMedian(circuit, offset.a, stretch), restMedian(circuit, offset.b, stretch)];
		if (a === null || b === null) continue;
		return told(circuit, offset, a - b, moves, stretch);
	}
	return not(why);
}

function told(circuit: Circuit, offset: Offset, value: number, moves: boolean | null, stretch: Interval): RestReading {
	const tolerance = limitAt(circuit.input.limits, 'pairedSensorTolerance', stretch.from)?.value ?? TOLERANCE;
	const clue = Math.max(LEAST_CLUE, 2 * Math.sqrt(2 * tolerance ** 2));
	const size = offset.positiveOnly ? value : Math.abs(value);
	let result: RestOutcome = size <= tolerance ? 'passed' : size > clue ? 'failed' : 'shown';
	let why = result === 'shown' ? 'Out of tolerance, but not by enough for a log alone.' : 'Water moving, both flat.';
	if (moves === null) [result, why] = ['shown', 'Whether the pump ran is not logged.'];
	if (offset.shownOnly) [result, why] = ['shown', 'A figure to compare with other rests.'];
	return { key: offset.key, result, value, quantity: 'temperatureDifference', why };
}
