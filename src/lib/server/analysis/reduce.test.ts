import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { reduceTrace } from './reduce';

const ramp = (n: number) => Float64Array.from({ length: n }, (_, i) => i * 1000);

describe('reduceTrace', () => {
	it('keeps every extreme, the ends and the breaks of a spiky trace (worked by hand: spikes at 1234 and 7777)', () => {
		const v = new Float64Array(10_000).fill(5);
		v[1234] = 99;
		v[7777] = -3;
		v[4000] = NaN;
		const { t, v: kept } = reduceTrace(ramp(10_000), v, 50);
		expect(kept.length).toBeLessThanOrEqual(50 * 5);
		expect(t[kept.indexOf(99)]).toBe(1_234_000);
		expect(t[kept.indexOf(-3)]).toBe(7_777_000);
		expect(kept.some(Number.isNaN)).toBe(true);
		expect([t[0], t.at(-1)]).toEqual([0, 9_999_000]);
	});

	it('returns a short trace as it is', () => {
		const t = ramp(20);
		expect(reduceTrace(t, t, 10).t).toBe(t);
	});

	it('gives instants in rising order and the same least and most, whatever the values', () => {
		fc.assert(
			fc.property(
				fc.array(fc.double({ noNaN: true }), { minLength: 60, maxLength: 400 }),
				fc.integer({ min: 1, max: 8 }),
				(values, columns) => {
					const v = Float64Array.from(values);
					const out = reduceTrace(ramp(v.length), v, columns);
					for (let i = 1; i < out.t.length; i++) expect(out.t[i]).toBeGreaterThan(out.t[i - 1] ?? NaN);
					expect(Math.min(...out.v)).toBe(Math.min(...v));
					expect(Math.max(...out.v)).toBe(Math.max(...v));
				}
			)
		);
	});

	it('refuses no columns', () => {
		expect(() => reduceTrace(ramp(3), ramp(3), 0)).toThrow(RangeError);
	});
});
