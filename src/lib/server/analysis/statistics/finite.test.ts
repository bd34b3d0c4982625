import { expect, it } from 'vitest';
import { finite, sortedFinite } from './finite';

it('leaves out what is no reading', () => {
	expect(finite([2, NaN, 1, Infinity])).toEqual([2, 1]);
	expect(sortedFinite(new Float64Array([2, NaN, 1]))).toEqual([1, 2]);
});
