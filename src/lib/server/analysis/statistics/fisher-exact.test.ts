import { expect, it } from 'vitest';
import { WORKED_EXAMPLES } from '../../../../../fixtures/statistics/worked-examples';
import { fisherExact } from './fisher-exact';

const [tea, twins] = WORKED_EXAMPLES.fisher_exact;

it('agrees with the tea tasting (Agresti 1990 p. 61, R fisher.test)', () => {
	const result = fisherExact(...tea.table[0], ...tea.table[1]);
	expect(result.greater).toBeCloseTo(tea.p_greater, 4);
	expect(result.twoSided).toBeCloseTo(tea.p_two_sided_computed, 9);
});

it('agrees with the twins (Fisher 1970, R fisher.test)', () => {
	const result = fisherExact(...twins.table[0], ...twins.table[1]);
	expect(result.twoSided).toBeCloseTo(twins.p_two_sided, 7);
	expect(result.less).toBeCloseTo(twins.p_less, 7);
});

it('says nothing about an empty row and refuses what is no count', () => {
	expect(fisherExact(0, 0, 2, 3).twoSided).toBeCloseTo(1, 12);
	expect(() => fisherExact(1.5, 0, 2, 3)).toThrow(RangeError);
});
