import { describe, expect, it } from 'vitest';
import { areaBelow, bandPath } from './area-path';

const plane = { x: (ms: number) => ms, y: (value: number) => 100 - value };
const all = { from: 0, to: 100 };

describe('areaBelow', () => {
	it('closes where the line crosses the level (worked by hand: halfway down, halfway up)', () => {
		expect(areaBelow({ t: [0, 10, 20], v: [10, 0, 10] }, 5, plane, all)).toBe('M5 95L10 100L15 95Z');
	});
	it('does not fill across a gap', () => {
		const area = areaBelow({ t: [0, 10, 20, 30], v: [0, 0, Number.NaN, 9] }, 5, plane, all);
		expect(area).toBe('M0 95L0 100L10 100L10 95Z');
	});
	it('fills held values as steps', () => {
		expect(areaBelow({ t: [0, 10, 20], v: [9, 2, 9] }, 5, plane, all, true)).toBe('M10 95L10 98L20 98L20 95Z');
	});
	it('is empty above the level, and closes at the last reading', () => {
		expect(areaBelow({ t: [0, 10], v: [7, 8] }, 5, plane, all)).toBe('');
		expect(areaBelow({ t: [0, 10], v: [1, 1] }, 5, plane, all)).toBe('M0 95L0 99L10 99L10 95Z');
	});
});

describe('bandPath', () => {
	it('runs along the upper edge and back along the lower, piece by piece', () => {
		expect(bandPath([0, 1, 2, 3], [1, 1, null, 4], [2, 2, 2, 5], (v) => v)).toBe('M0 2L1 2L1 1L0 1ZM3 5L3 4Z');
	});
});
