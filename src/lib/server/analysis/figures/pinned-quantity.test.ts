import { describe, expect, it } from 'vitest';
import { analyseCircuit } from '../analyse-circuit';
import { inventedInput, inventedLog, type Shape } from '../testing/synthetic-log';

// Invented: four runs that stand at 60, 70, 80 and 75 % with full demand; the rated current is not known.
const levels = [60, 70, 80, 75];
const runs = levels.map((_, i) => ({ start: 3600 + i * 14_400, stop: 10_800 + i * 14_400 }));
const levelAt = (t: number) => levels[Math.floor((t - 3600) / 14_400)] ?? 0;
const verdicts = (motorCurrent: Shape, saturations: { evap?: Shape; cond?: Shape } = {}) => {
	const series = inventedLog(runs, 5, 0, 61_200, {
		capacity: (t, s) => (Number.isNaN(s) ? 0 : Math.min(40 + s / 6, levelAt(t))),
		demand: () => 100,
		evapSaturation: saturations.evap ?? (() => 5),
		condSaturation: saturations.cond ?? (() => 35),
		motorCurrent: (t, s) => (Number.isNaN(s) ? 0 : motorCurrent(t, s))
	});
	return analyseCircuit(inventedInput(series)).starts.map((s) => [s.stall?.verdict, s.stall?.limiting]);
};

describe('markPinnedQuantity', () => {
	it('knows a current limit by the current that stands while capacity differs', () => {
		expect(verdicts((_, s) => Math.min(180, 120 + s / 4))).toEqual(levels.map(() => ['limited', 'motor current']));
	});

	it('knows a condensing or a low-saturation limit by the saturation that stands where the runs end', () => {
		const current: Shape = (t) => 2 * levelAt(t);
		const cond: Shape = (_, s) => (Number.isNaN(s) ? 25 : Math.min(42, 30 + s / 60));
		const evap: Shape = (_, s) => (Number.isNaN(s) ? 15 : Math.max(5, 9 - s / 600));
		expect(verdicts(current, { cond })).toEqual(levels.map(() => ['limited', 'condensing']));
		expect(verdicts(current, { evap })).toEqual(levels.map(() => ['limited', 'evaporator saturation']));
	});

	it('leaves a stall a stall where the current goes with the capacity', () => {
		expect(verdicts((t) => 2 * levelAt(t))).toEqual(levels.map(() => ['stall', null]));
	});
});
