import { describe, expect, it } from 'vitest';
import { localSpacing, nearestSample, snapTo, stepSample } from './nearest-sample';

const nan = Number.NaN;
// Invented readings every 10 s with a break at 30.
const readings = { t: [0, 10, 20, 30, 40, 50], v: [1, 2, 3, nan, 5, 6] };

describe('nearestSample', () => {
	it('reads the nearest stored sample and never one in between', () => {
		expect(nearestSample(readings, 14, false, 10)).toEqual({ index: 1, at: 10, value: 2 });
		expect(nearestSample(readings, 16, false, 10)?.value).toBe(3);
		expect(nearestSample(readings, 10, false, 10)?.value).toBe(2);
	});
	it('says nothing in a gap', () => {
		expect(nearestSample(readings, 30, false, 5)).toBeNull();
		expect(nearestSample({ t: [0, 500], v: [1, 2] }, 250, false, 10)).toBeNull();
		expect(nearestSample(readings, 900, false, 10)).toBeNull();
	});
	it('holds a change-of-value record until the next, and up to a break', () => {
		expect(nearestSample(readings, 19, true, 0)?.value).toBe(2);
		expect(nearestSample(readings, 35, true, 0)).toBeNull();
		expect(nearestSample(readings, 9000, true, 0)?.value).toBe(6);
	});
	it('has nothing before the first reading', () => {
		expect(nearestSample(readings, -1, true, 0)).toBeNull();
		expect(nearestSample({ t: [], v: [] }, 0, false, 10)).toBeNull();
	});
});

describe('localSpacing', () => {
	it('is the median step near the instant', () => {
		expect(localSpacing([0, 60, 120, 125, 130, 135, 140], 132, 10)).toBe(5);
		expect(localSpacing([0, 60, 120], 5000, 10)).toBe(60);
		expect(localSpacing([], 0)).toBe(0);
	});
});

describe('stepSample', () => {
	it('moves a sample at a time and stays at the ends', () => {
		const t = [0, 10, 20];
		expect(stepSample(t, 10, 1)).toBe(20);
		expect(stepSample(t, 10, -1)).toBe(0);
		expect(stepSample(t, 12, 1)).toBe(20);
		expect(stepSample(t, 12, -1)).toBe(10);
		expect(stepSample(t, 20, 1)).toBe(20);
		expect(stepSample(t, 0, -1)).toBe(0);
		expect(stepSample([], 7, 1)).toBe(7);
	});
});

describe('snapTo', () => {
	it('takes the nearer neighbour, the earlier one on a tie', () => {
		expect([-5, 4, 5, 6, 99].map((at) => snapTo([0, 10, 20], at))).toEqual([0, 0, 0, 10, 20]);
		expect(snapTo([], 3)).toBe(3);
	});
});
