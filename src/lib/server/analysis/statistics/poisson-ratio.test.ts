import { expect, it } from 'vitest';
import { WORKED_EXAMPLES } from '../../../../../fixtures/statistics/worked-examples';
import { poissonRatio } from './poisson-ratio';

it("agrees with R's poisson.test of 11/800 against 21/3011", () => {
	const [example] = WORKED_EXAMPLES.poisson_rate_ratio;
	const result = poissonRatio(example.events, example.time);
	expect(result?.ratio).toBeCloseTo(example.rate_ratio, 5);
	expect(result?.twoSided).toBeCloseTo(example.p, 5);
	expect(result?.low).toBeCloseTo(example.ci95[0], 5);
	expect(result?.high).toBeCloseTo(example.ci95[1], 5);
});

it('has no ratio without an event and refuses no exposure', () => {
	expect(poissonRatio([0, 0], [10, 10])).toBeNull();
	expect(() => poissonRatio([1, 0], [0, 10])).toThrow(RangeError);
});
