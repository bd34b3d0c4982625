import { SIGNALS, type SignalKey } from '$lib/model/signals';
import { POSSIBLE } from '../values/units';

/** Where a signal's readings lie, in stored units: all of them (`wide`, resting machine included) and their median (`usual`). */
type Range = { wide: readonly [number, number]; usual: readonly [number, number] };

/** Plain physics of water chillers, for telling units apart: common practice, no source. Never a verdict on a machine. */
const RANGES: Readonly<Partial<Record<SignalKey, Range>>> = {
	evapSaturation: { wide: [-25, 38], usual: [-10, 26] },
	evapWaterIn: { wide: [-12, 42], usual: [-6, 28] },
	evapWaterOut: { wide: [-12, 40], usual: [-8, 25] },
	waterSetpoint: { wide: [-12, 30], usual: [-10, 22] },
	suctionTemp: { wide: [-25, 45], usual: [-10, 30] },
	condSaturation: { wide: [-10, 75], usual: [8, 60] },
	condWaterIn: { wide: [-2, 52], usual: [8, 42] },
	condWaterOut: { wide: [-2, 58], usual: [8, 48] },
	condAirIn: { wide: [-35, 55], usual: [-10, 45] },
	outdoorTemp: { wide: [-40, 55], usual: [-15, 45] },
	liquidTemp: { wide: [-15, 70], usual: [5, 55] },
	dischargeTemp: { wide: [-10, 135], usual: [12, 100] },
	oilTemp: { wide: [-5, 115], usual: [14, 85] },
	windingTemp: { wide: [-10, 170], usual: [10, 130] },
	evapPressure: { wide: [5, 2600], usual: [20, 1800] },
	condPressure: { wide: [5, 4500], usual: [60, 3600] },
	dischargePressure: { wide: [5, 4500], usual: [60, 3600] },
	oilPressure: { wide: [5, 4800], usual: [60, 3800] },
	oilFilterDrop: { wide: [-60, 800], usual: [-20, 400] },
	motorCurrent: { wide: [-5, 3000], usual: [-2, 2500] },
	power: { wide: [-10, 8000], usual: [-5, 5000] },
	evapFlow: { wide: [-2, 2500], usual: [-1, 1500] },
	condFlow: { wide: [-2, 3000], usual: [-1, 2000] },
	speed: { wide: [-1, 700], usual: [-0.5, 600] },
	demand: { wide: [-5, 130], usual: [-1, 120] },
	capacity: { wide: [-5, 130], usual: [-1, 120] },
	valvePosition: { wide: [-5, 130], usual: [-1, 110] }
};

/** The range of a signal; signals without one of their own have their quantity's possible values. */
export function rangeOf(signal: SignalKey): Range {
	const own = RANGES[signal];
	if (own) return own;
	const possible = POSSIBLE[SIGNALS[signal].quantity] ?? [-Infinity, Infinity];
	return { wide: possible, usual: possible };
}
