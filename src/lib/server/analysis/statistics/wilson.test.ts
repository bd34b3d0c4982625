import { describe, expect, it } from 'vitest';
import { WORKED_EXAMPLES } from '../../../../../fixtures/statistics/worked-examples';
import { wilson } from './wilson';

describe('wilson', () => {
	for (const { source, cases } of WORKED_EXAMPLES.wilson)
		it.each(cases)(`$k of $n: ${source.slice(0, 60)}`, ({ k, n, ci }) => {
			const interval = wilson(k, n);
			expect(interval?.low).toBeCloseTo(ci[0], 4);
			expect(interval?.high).toBeCloseTo(ci[1], 4);
		});
	it('has no interval without a try, and refuses more trips than tries', () => {
		expect(wilson(0, 0)).toBeNull();
		expect(() => wilson(4, 3)).toThrow(RangeError);
	});
});
