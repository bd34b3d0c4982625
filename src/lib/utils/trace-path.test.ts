import { describe, expect, it } from 'vitest';
import { lonePoints, lowerBound, samplePoints, tracePath } from './trace-path';

// Invented readings; a plane of 1 px a second and 1 px a unit keeps every expectation readable.
const plane = { x: (ms: number) => ms / 1000, y: (value: number) => 100 - value };
const all = { from: 0, to: 100_000 };
const nan = Number.NaN;

describe('lowerBound', () => {
	it('finds the first reading at or after an instant', () => {
		expect([0, 10, 11, 30, 31].map((at) => lowerBound([10, 20, 30], at))).toEqual([0, 0, 1, 2, 3]);
	});
});

describe('tracePath', () => {
	it('joins readings with straight lines', () => {
		expect(tracePath({ t: [0, 1000, 2000], v: [10, 20, 15] }, plane, all)).toBe('M0 90L1 80L2 85');
	});
	it('lifts the pen at a break and never bridges it', () => {
		const path = tracePath({ t: [0, 1000, 2000, 3000, 4000], v: [1, 1, nan, 2, 2] }, plane, all);
		expect(path).toBe('M0 99L1 99M3 98L4 98');
	});
	it('lifts the pen when readings lie too far apart', () => {
		expect(tracePath({ t: [0, 1000, 9000], v: [1, 1, 1] }, plane, all, { lift: 5000 })).toBe('M0 99L1 99M9 99');
	});
	it('draws changes of value as steps, held up to the break', () => {
		const path = tracePath({ t: [0, 5000, 8000, 9000], v: [1, 3, nan, 4] }, plane, all, { step: true });
		expect(path).toBe('M0 99H5V97H8M9 96');
	});
	it('keeps one reading outside the window at either side', () => {
		const path = tracePath({ t: [0, 1000, 2000, 3000, 4000], v: [1, 2, 3, 4, 5] }, plane, { from: 1500, to: 2500 });
		expect(path).toBe('M1 98L2 97L3 96');
	});
});

describe('lonePoints', () => {
	it('finds readings with a break on both sides', () => {
		expect(lonePoints({ t: [0, 1000, 2000, 3000], v: [nan, 7, nan, 8] }, plane, all)).toEqual([
			[1, 93],
			[3, 92]
		]);
	});
});

describe('samplePoints', () => {
	it('shows the points of coarse sampling', () => {
		expect(samplePoints({ t: [0, 20_000, 40_000], v: [1, 2, 3] }, plane, all)).toEqual([
			[0, 99],
			[20, 98],
			[40, 97]
		]);
	});
	it('stays silent where the readings are dense', () => {
		const t = Array.from({ length: 50 }, (_, k) => k * 1000);
		expect(samplePoints({ t, v: t }, plane, all)).toEqual([]);
	});
});
