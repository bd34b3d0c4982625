import { expect, it } from 'vitest';
import { weightedQuantile } from './weighted-quantile';

it('is the least value whose weight reaches the share (by hand)', () => {
	const items = [
		{ value: 10, weight: 1 },
		{ value: 5, weight: 1 },
		{ value: 20, weight: 2 }
	];
	expect(weightedQuantile(items, 0.25)).toBe(5);
	expect(weightedQuantile(items, 0.51)).toBe(20);
	expect(weightedQuantile([{ value: 1, weight: 0 }], 0.5)).toBeNull();
	expect(() => weightedQuantile(items, -1)).toThrow(RangeError);
});
