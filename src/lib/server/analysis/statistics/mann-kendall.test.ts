import { expect, it } from 'vitest';
import { WORKED_EXAMPLES } from '../../../../../fixtures/statistics/worked-examples';
import { mannKendall } from './mann-kendall';

it('agrees with the Nile series', () => {
	const expected = WORKED_EXAMPLES.mann_kendall[1];
	const result = mannKendall(WORKED_EXAMPLES.change_point_nile.values);
	expect(result?.s).toBe(expected.S);
	expect(result?.variance).toBeCloseTo(expected.var_s, 6);
	expect(result?.z).toBeCloseTo(expected.z, 9);
	expect(result?.twoSided).toBeCloseTo(expected.p, 9);
});

it('needs four readings', () => {
	expect(mannKendall([1, 2, 3])).toBeNull();
});
