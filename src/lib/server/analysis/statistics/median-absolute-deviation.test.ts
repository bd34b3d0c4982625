import { expect, it } from 'vitest';
import { medianAbsoluteDeviation } from './median-absolute-deviation';

it('agrees with the usual textbook set 1 1 2 2 4 6 9: MAD 1', () => {
	expect(medianAbsoluteDeviation([1, 1, 2, 2, 4, 6, 9])).toBe(1);
	expect(medianAbsoluteDeviation([NaN])).toBeNull();
});
