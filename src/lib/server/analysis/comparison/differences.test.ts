import { expect, it } from 'vitest';
import { MINUTE, MONDAY, startRecord, trippedRecord } from '../../../../../fixtures/inference/start-record';
import { differencesOf, DISCRIMINATORS, strongestPossible } from './differences';

const group = (make: typeof startRecord, values: number[], spread = 0) =>
	values.map((startCapacity, i) =>
		make(MONDAY + i * MINUTE, {
			figures: {
				startCapacity,
				condWaterInAtStart: 22 + (i % 3) + spread,
				minEvapSaturation: 1 + i / 10,
				superheat: 5 + i / 10
			}
		})
	);
const tripped = group(trippedRecord, [72, 75, 71, 78, 74, 73]);
const held = group(startRecord, [44, 46, 43, 45, 47, 42], 0.1);

it('finds the figure that differs and leaves the others unclear (invented)', () => {
	const rows = differencesOf(tripped, held, new Set());
	expect(rows[0]).toMatchObject({
		key: 'startCapacity',
		role: 'tested',
		clear: true,
		words: 'always higher',
		superiority: 1
	});
	// 6 against 6 without overlap: 2/C(12, 6) = 2/924, doubled by the family of two (by hand).
	expect(rows[0]?.chance).toBeCloseTo(4 / 924, 9);
	expect(rows[0]?.a).toBe(73.5);
	expect(rows.find((row) => row.key === 'condWaterInAtStart')).toMatchObject({
		clear: false,
		words: 'no clear difference'
	});
});

it('describes what defines a trip or the groups, and never sets settled figures of held runs beside trips', () => {
	const rows = differencesOf(tripped, held, new Set(['startCapacity']));
	expect(rows.find((row) => row.key === 'minEvapSaturation')?.role).toBe('described');
	expect(rows.find((row) => row.key === 'startCapacity')?.role).toBe('described');
	expect(rows.some((row) => row.key === 'superheat')).toBe(false);
	expect(differencesOf(held, held, new Set()).find((row) => row.key === 'superheat')?.role).toBe('exploratory');
});

it('shows and does not test when there are too few', () => {
	const rows = differencesOf(tripped.slice(0, 2), held.slice(0, 3), new Set());
	expect(rows[0]).toMatchObject({ role: 'too-few', clear: false, words: 'too few to tell' });
	expect(strongestPossible(2, 3)).toBeCloseTo(0.2, 12);
	expect(strongestPossible(3, 4)).toBeCloseTo(2 / 35, 12);
});

it('declares eight discriminators at most', () => {
	expect(DISCRIMINATORS.length).toBeLessThanOrEqual(8);
});
