import { expect, it } from 'vitest';
import { quantile } from './quantile';

it("agrees with R's quantile(1:10) type 7: 25 % is 3.25", () => {
	const tenth = Array.from({ length: 10 }, (_, i) => i + 1);
	expect(quantile(tenth, 0.25)).toBe(3.25);
	expect(quantile(tenth, 0.9)).toBeCloseTo(9.1, 12);
});

it('leaves out what is no reading', () => {
	expect(quantile([NaN, 4], 0.5)).toBe(4);
	expect(quantile([NaN], 0.5)).toBeNull();
	expect(() => quantile([1], 2)).toThrow(RangeError);
});
