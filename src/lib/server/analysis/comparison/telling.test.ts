import { describe, expect, it } from 'vitest';
import { wordsFor } from '../wording/quantity-words';
import type { Difference } from './differences';
import { reachWords, tellingFirst, tellingSize } from './telling';

/** An invented row of the table. */
const row = (more: Partial<Difference>): Difference => ({
	key: 'startCapacity',
	label: 'Capacity at start',
	quantity: 'percent',
	shiftQuantity: 'percent',
	a: 72,
	b: 45,
	countA: 9,
	countB: 9,
	shift: 27,
	low: 22,
	high: 31,
	coverage: 0.95,
	superiority: 1,
	role: 'tested',
	chance: 0.001,
	clear: true,
	words: 'always higher',
	...more
});

describe('tellingFirst', () => {
	it('leaves out what is certain but trifling (by hand: 0.2 K is a third of 0.6 K)', () => {
		const trifle = row({ key: 'liftAtStart', shiftQuantity: 'temperatureDifference', shift: 0.2 });
		expect(tellingSize(trifle)).toBeCloseTo(1 / 3);
		expect(tellingFirst([trifle, row({})])).toHaveLength(1);
	});

	it('leads with the largest of those that are alike certain', () => {
		const small = row({ key: 'liftAtStart', shiftQuantity: 'temperatureDifference', shift: 0.9 });
		expect(tellingFirst([small, row({})]).map((one) => one.key)).toEqual(['startCapacity', 'liftAtStart']);
	});

	it('takes a twentieth of the larger median where a quantity has no size of its own', () => {
		expect(tellingSize(row({ shiftQuantity: 'flow', a: 40, b: 30, shift: 10 }))).toBeCloseTo(5);
	});
});

describe('reachWords', () => {
	const words = wordsFor('si');
	it('gives both ends, one where they read alike, none across zero', () => {
		expect(reachWords(row({}), words)).toBe(', by 22 % to 31 %');
		expect(reachWords(row({ low: -1.4, high: -0.6 }), words)).toBe(', by about 1 %');
		expect(reachWords(row({ low: -1, high: 3 }), words)).toBe('');
		expect(reachWords(row({ low: null }), words)).toBe('');
	});
});
