import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { firstAtOrAfter, lastAtOrBefore } from './search';

describe('binary searches', () => {
	it('agree with a plain walk', () => {
		const rising = fc.uniqueArray(fc.integer({ min: 0, max: 50 })).map((a) => a.sort((x, y) => x - y));
		fc.assert(
			fc.property(rising, fc.integer({ min: -5, max: 55 }), (t, at) => {
				const first = t.findIndex((x) => x >= at);
				expect(firstAtOrAfter(t, at)).toBe(first < 0 ? t.length : first);
				expect(lastAtOrBefore(t, at)).toBe(t.filter((x) => x <= at).length - 1);
			})
		);
	});
});
