import { expect, it } from 'vitest';
import { WORKED_EXAMPLES } from '../../../../../fixtures/statistics/worked-examples';
import { theilSen } from './theil-sen';

const [sen] = WORKED_EXAMPLES.theil_sen;

it("agrees with Sen's example of 1968 (as in SciPy's tests)", () => {
	const line = theilSen(sen.x, sen.y, 1 - sen.alpha);
	expect(line?.slope).toBe(sen.slope);
	expect(line?.intercept).toBe(sen.intercept);
	expect(line?.low).toBeCloseTo(sen.low, 2);
	expect(line?.high).toBeCloseTo(sen.high, 2);
});

it('agrees with the Nile trend of −2.6 a year', () => {
	const { values } = WORKED_EXAMPLES.change_point_nile;
	const years = values.map((_, i) => i);
	expect(theilSen(years, values)?.slope).toBeCloseTo(WORKED_EXAMPLES.mann_kendall[1].sen_slope, 9);
});

it('is not moved by one wild reading, and cannot be had of one instant', () => {
	expect(theilSen([0, 1, 2, 3, 4, 5], [0, 1, 2, 300, 4, 5])?.slope).toBe(1);
	expect(theilSen([1, 1], [2, 3])).toBeNull();
});
