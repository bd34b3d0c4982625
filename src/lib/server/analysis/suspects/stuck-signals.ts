import type { SignalKey } from '$lib/model/signals';
import type { FigureKey, StartRecord } from '$lib/model/start';
import { quantile } from '../statistics/quantile';
import type { TraceReader } from './trace-reader';

/** Signals that settled figures rest on: when one of them is stuck, the figure is no witness. */
export const FIGURE_SIGNALS: Partial<Record<FigureKey, readonly SignalKey[]>> = {
	evapApproach: ['evapWaterOut', 'evapSaturation'],
	condApproach: ['condSaturation', 'condWaterOut'],
	superheat: ['suctionTemp', 'evapSaturation'],
	settledDischargeSuperheat: ['dischargeTemp', 'condSaturation'],
	settledSubcooling: ['condSaturation', 'liquidTemp'],
	settledMargin: ['oilTemp', 'condSaturation'],
	settledOilTemp: ['oilTemp'],
	evapDelta: ['evapWaterIn', 'evapWaterOut'],
	oilLiftAtStart: ['oilTemp', 'evapSaturation']
};

const BEFORE_MS = 600_000;
const AFTER_MS = 900_000;
const LEAST_READINGS = 6;
/** A stuck reading may still wiggle by its converter's last steps, K. */
const STILL = 0.15;
/** These move by more than a kelvin through any start, so that noise on a stuck one may be larger. */
const ALWAYS_MOVES: ReadonlySet<SignalKey> = new Set([
	'condSaturation',
	'condWaterOut',
	'dischargeTemp',
	'evapSaturation'
]);
const NOISY_STILL = 0.4;

/** Between the 5th and the 95th percentile: a single wild reading frees no stuck sensor. */
function spread(values: readonly number[]): number {
	return (quantile(values, 0.95) ?? 0) - (quantile(values, 0.05) ?? 0);
}

/**
 * Finds signals that are stuck at a start: still (0.15 K, or 0.4 K where every start moves kelvins) from 10 min before it to 15 min after it, through which every
 * temperature of a refrigerating circuit moves. A run under 15 min, or too few readings, is not judged.
 */
export function stuckFinder(reader: TraceReader): (signal: SignalKey, start: StartRecord) => boolean {
	const known = new Map<string, boolean>();
	return (signal, start) => {
		const key = `${signal} ${start.startedAt}`;
		let stuck = known.get(key);
		if (stuck === undefined) {
			const long = start.endedAt === null || start.endedAt - start.startedAt >= AFTER_MS;
			const values = long ? reader.values(signal, start.startedAt - BEFORE_MS, start.startedAt + AFTER_MS) : [];
			stuck = values.length >= LEAST_READINGS && spread(values) <= (ALWAYS_MOVES.has(signal) ? NOISY_STILL : STILL);
			known.set(key, stuck);
		}
		return stuck;
	};
}
