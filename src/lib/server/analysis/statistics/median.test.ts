import { expect, it } from 'vitest';
import { median } from './median';

it('is the middle one or the mean of two (by hand)', () => {
	expect(median([5, 1, 3])).toBe(3);
	expect(median([5, 1, 3, 4])).toBe(3.5);
	expect(median([])).toBeNull();
});
