import { expect, it } from 'vitest';
import { WORKED_EXAMPLES } from '../../../../../fixtures/statistics/worked-examples';
import { hodgesLehmann } from './hodges-lehmann';

it('is the median of the differences, with the interval and coverage worked by hand', () => {
	// 3 against 3, no overlap: differences of {10, 12, 15} and {1, 2, 4} sorted: 6 8 8 9 10 11 11 13 14.
	// P(U = 0) = 1/C(6, 3) = 0.05, so a two-sided 90 % interval may cut one difference at each end.
	const result = hodgesLehmann([10, 12, 15], [1, 2, 4], 0.9);
	expect(result?.shift).toBe(10);
	expect(result?.interval?.low).toBe(6);
	expect(result?.interval?.high).toBe(14);
	expect(result?.interval?.coverage).toBeCloseTo(0.9, 12);
});

it('has no 95 % interval for 3 against 3', () => {
	expect(hodgesLehmann([10, 12, 15], [1, 2, 4])?.interval).toBeNull();
});

it('covers at least what was asked, with published data (Hollander & Wolfe 1973 p. 69)', () => {
	const [{ x, y }] = WORKED_EXAMPLES.mann_whitney;
	const result = hodgesLehmann(x, y);
	// R's wilcox.test(conf.int = TRUE) of the same data gives 0.305 and −0.76…0.15 for y − x signs reversed (recalled).
	expect(result?.shift).toBeCloseTo(0.305, 3);
	expect(result?.interval?.coverage).toBeGreaterThanOrEqual(0.95);
	expect(result?.interval?.low).toBeLessThan(0);
});

it('cannot be had of an empty group', () => {
	expect(hodgesLehmann([], [1])).toBeNull();
});
