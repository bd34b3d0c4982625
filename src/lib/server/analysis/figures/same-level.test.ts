import { expect, it } from 'vitest';
import { analyseCircuit } from '../analyse-circuit';
import { inventedInput, inventedLog } from '../testing/synthetic-log';

// Invented: five runs that stand at 65 %; in the last one condensing comes within 2 K of its cut-out.
const runs = Array.from({ length: 5 }, (_, i) => ({ start: 3600 + i * 14_400, stop: 10_800 + i * 14_400 }));
const verdicts = (lastLevel: number) => {
	const last = 3600 + 4 * 14_400;
	const series = inventedLog(runs, 5, 0, 75_600, {
		capacity: (t, s) => (Number.isNaN(s) ? 0 : Math.min(40 + s / 6, t >= last ? lastLevel : 65)),
		demand: () => 100,
		evapSaturation: () => 5,
		condSaturation: (t) => (t >= last ? 42 : 36),
		motorCurrent: (t, s) => (Number.isNaN(s) ? 0 : t >= last ? 2 * lastLevel : 130)
	});
	const limits = { condSaturationCutout: [{ value: 44, provenance: 'maker' as const, validFrom: -Infinity }] };
	return analyseCircuit(inventedInput(series, { limits })).starts.map((start) => start.stall?.verdict);
};

it('calls a stall a stall at the level of all the others, however near a limit came', () => {
	expect(verdicts(65)).toEqual(['stall', 'stall', 'stall', 'stall', 'stall']);
});

it('keeps the limit where the capacity stands elsewhere', () => {
	expect(verdicts(52)).toEqual(['stall', 'stall', 'stall', 'stall', 'limited']);
});
