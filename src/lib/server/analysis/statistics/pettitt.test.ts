import { expect, it } from 'vitest';
import { WORKED_EXAMPLES } from '../../../../../fixtures/statistics/worked-examples';
import { pettitt } from './pettitt';

const nile = WORKED_EXAMPLES.change_point_nile;

it('finds the change of the Nile after 1898', () => {
	const change = pettitt(nile.values);
	expect(change?.index).toBe(nile.break_index);
	expect(change?.statistic).toBe(nile.computed_here.pettitt_K);
	expect(change?.twoSided).toBeCloseTo(nile.computed_here.pettitt_p, 9);
});

it('finds nothing telling in a level series, and nothing at all in five readings', () => {
	expect(pettitt([5, 6, 5, 6, 5, 6, 5, 6])?.twoSided).toBe(1);
	expect(pettitt([1, 2, 3, 4, 5])).toBeNull();
});
