import { describe, expect, it } from 'vitest';
import { bareExtents, coverLine, traceExtents } from './trace-extents';

const x = (ms: number) => ms;
const y = (value: number) => value;
const at = (e: { top: Float32Array; bottom: Float32Array }, column: number) => [e.top[column], e.bottom[column]];

describe('traceExtents', () => {
	it('covers a slope column by column (worked by hand: one px down a column)', () => {
		const extents = traceExtents({ t: [0, 10], v: [0, 10] }, x, y, { from: 0, to: 10 }, 10);
		expect(at(extents, 0)).toEqual([0, 0.5]);
		expect(at(extents, 5)).toEqual([4.5, 5.5]);
		expect(at(extents, 10)).toEqual([9.5, 10]);
	});
	it('leaves a gap bare', () => {
		const extents = traceExtents({ t: [0, 3, 4, 7, 9], v: [1, 1, Number.NaN, 2, 2] }, x, y, { from: 0, to: 10 }, 10);
		expect(at(extents, 2)).toEqual([1, 1]);
		expect(at(extents, 5)).toEqual([Number.NaN, Number.NaN]);
		expect(at(extents, 8)).toEqual([2, 2]);
	});
	it('covers the riser of a step, and its tread before it', () => {
		const extents = traceExtents({ t: [0, 6, 9], v: [2, 8, 8] }, x, y, { from: 0, to: 10 }, 10, true);
		expect(at(extents, 3)).toEqual([2, 2]);
		expect(at(extents, 6)).toEqual([2, 8]);
		expect(at(extents, 8)).toEqual([8, 8]);
	});
});

describe('coverLine', () => {
	it('ignores what lies outside the paper', () => {
		const extents = bareExtents(4);
		coverLine(extents, -20, 5, 30, 5);
		expect(Array.from(extents.top)).toEqual([5, 5, 5, 5, 5]);
	});
});
