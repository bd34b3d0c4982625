import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decodeTimes, decodeValues, encodeTimes, encodeValues } from './block-codec';

const same = (a: Float64Array, b: Float64Array) => a.length === b.length && a.every((x, i) => Object.is(x, b[i]));

describe('times', () => {
	it('come back, in any order', () => {
		fc.assert(
			fc.property(fc.array(fc.integer({ min: -1e12, max: 4e12 }), { maxLength: 200 }), (list) => {
				const t = Float64Array.from(list);
				return same(decodeTimes(encodeTimes(t)), t);
			})
		);
	});
	it('take next to nothing at a steady spacing', () => {
		const t = Float64Array.from({ length: 17_280 }, (_, i) => 1.74e12 + i * 5000);
		expect(encodeTimes(t).length).toBeLessThan(120);
	});
	it('refuses what is no whole millisecond', () => {
		expect(() => encodeTimes(Float64Array.of(0.5))).toThrow(RangeError);
	});
});

describe('values', () => {
	it('come back bit for bit, holes and all', () => {
		const any = fc.oneof(
			fc.double(),
			fc.constant(NaN),
			fc.integer().map((n) => n / 10),
			fc.float(),
			fc.constant(-0)
		);
		fc.assert(
			fc.property(fc.array(any, { maxLength: 300 }), (list) => {
				const v = Float64Array.from(list);
				return same(decodeValues(encodeValues(v)), v);
			}),
			{ numRuns: 500 }
		);
	});
	it('come back bit for bit when the file was written in °F or psig', () => {
		const scales = fc.constantFrom(
			{ factor: 1 / 1.8, offset: -32 / 1.8 },
			{ factor: 6.894757293168361, offset: 101.325 },
			{ factor: 1, offset: 0 }
		);
		const figures = fc.array(fc.option(fc.integer({ min: -5000, max: 5000 }), { nil: null }), {
			minLength: 1,
			maxLength: 300
		});
		fc.assert(
			fc.property(scales, figures, fc.integer({ min: 0, max: 3 }), (scale, list, places) => {
				const v = Float64Array.from(list, (n) => (n === null ? NaN : (n / 10 ** places) * scale.factor + scale.offset));
				return same(decodeValues(encodeValues(v, scale)), v);
			})
		);
	});
	it('of one decimal in °F take a fraction of a byte', () => {
		const scale = { factor: 1 / 1.8, offset: -32 / 1.8 };
		const v = Float64Array.from(
			{ length: 17_280 },
			(_, i) => (Math.round(440 + 60 * Math.sin(i / 900)) / 10) * scale.factor + scale.offset
		);
		expect(encodeValues(v, scale).length / v.length).toBeLessThan(0.25);
	});
	it('keeps a counter of 15 digits', () => {
		const v = Float64Array.from({ length: 50 }, (_, i) => 900_000_000_000_000 + i);
		expect(same(decodeValues(encodeValues(v)), v)).toBe(true);
	});
	it('refuses bytes that are no block', () => {
		expect(() => decodeValues(new Uint8Array(3))).toThrow(RangeError);
		expect(() => decodeTimes(encodeTimes(Float64Array.of(1, 2)).subarray(0, 2))).toThrow();
	});
});
