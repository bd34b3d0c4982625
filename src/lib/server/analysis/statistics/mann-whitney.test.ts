import { expect, it } from 'vitest';
import { WORKED_EXAMPLES } from '../../../../../fixtures/statistics/worked-examples';
import { mannWhitney, rankSumDistribution } from './mann-whitney';

const [hollander, shier] = WORKED_EXAMPLES.mann_whitney;

it('agrees with Hollander & Wolfe 1973 p. 69 (R wilcox.test)', () => {
	const result = mannWhitney(hollander.x, hollander.y);
	expect(result?.u).toBe(hollander.W);
	expect(result?.greater).toBeCloseTo(hollander.p_exact, 4);
	expect(result?.exact).toBe(true);
});

it('agrees with Shier 2004 (SciPy mannwhitneyu)', () => {
	const result = mannWhitney(shier.x, shier.y);
	expect(result?.u).toBe(shier.U1);
	expect(result?.twoSided).toBeCloseTo(shier.p_exact_two_sided, 12);
	expect(mannWhitney(shier.y, shier.x)?.less).toBeCloseTo(shier.p_exact_females_less, 12);
});

it('counts ties exactly: of the three ways to choose one of 1, 1, 2 one has the largest sum (by hand)', () => {
	const result = mannWhitney([2], [1, 1]);
	expect(result?.greater).toBeCloseTo(1 / 3, 12);
	expect(result?.less).toBeCloseTo(1, 12);
});

it('gives chances that sum to one', () => {
	const sum = rankSumDistribution([3, 3, 6, 8, 10], 2).reduce((total, chance) => total + chance, 0);
	expect(sum).toBeCloseTo(1, 12);
});

it('is close to exact just past the limit of the exact form', () => {
	const x = Array.from({ length: 40 }, (_, i) => i * 1.1);
	const y = Array.from({ length: 40 }, (_, i) => i * 1.1 + 5.05);
	const exact = mannWhitney(x, y);
	const normal = mannWhitney([...x, 22.3], y);
	expect(exact?.exact).toBe(true);
	expect(normal?.exact).toBe(false);
	expect(Math.abs((exact?.twoSided ?? 0) - (normal?.twoSided ?? 1))).toBeLessThan(0.02);
});

it('cannot test an empty group', () => {
	expect(mannWhitney([NaN], [1, 2])).toBeNull();
});
