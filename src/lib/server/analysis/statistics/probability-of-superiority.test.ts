import { expect, it } from 'vitest';
import { probabilityOfSuperiority } from './probability-of-superiority';

it('counts pairs, ties half (by hand: 3 of 4 pairs and one tie)', () => {
	expect(probabilityOfSuperiority([2, 3], [1, 2])).toBe(3.5 / 4);
});

it('agrees with U/(n1·n2) of Shier 2004: 17 of 20', () => {
	expect(probabilityOfSuperiority([19, 22, 16, 29, 24], [20, 11, 17, 12])).toBeCloseTo(0.85, 12);
	expect(probabilityOfSuperiority([], [1])).toBeNull();
});
