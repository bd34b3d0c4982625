import { describe, expect, it } from 'vitest';
import type { Series } from '$lib/model/series';
import { isGapBefore, localSpacing, spacingWithin } from './spacing';

const seriesAt = (seconds: readonly number[], blank: (i: number) => boolean = () => false): Series => {
	const t = Float64Array.from(seconds, (s) => s * 1000);
	return { t, v: t.map((_, i) => (blank(i) ? NaN : i)), logging: 'interval' };
};
const every = (step: number, from: number, to: number) =>
	Array.from({ length: Math.floor((to - from) / step) + 1 }, (_, i) => from + i * step);

describe('local spacing', () => {
	it('is that of the place, whatever the log does elsewhere, blanks notwithstanding', () => {
		const series = seriesAt([...every(60, 0, 3600), ...every(5, 3605, 4500)], (i) => i % 7 === 3);
		expect(localSpacing(series, 1_800_000)).toBe(60);
		expect(localSpacing(series, 4_000_000)).toBe(5);
		expect(spacingWithin(series, 3_700_000, 4_400_000)).toBe(5);
		expect(localSpacing(seriesAt([10]), 10_000)).toBeNull();
	});
});

describe('gaps', () => {
	const gaps = (seconds: number[]) => {
		const t = Float64Array.from(seconds, (s) => s * 1000);
		return seconds.filter((_, i) => i > 0 && isGapBefore(t, i));
	};

	it('are over max(3 × local spacing, 60 s)', () => {
		expect(gaps([...every(5, 0, 100), ...every(5, 160, 260)])).toEqual([]);
		expect(gaps([...every(5, 0, 100), ...every(5, 161, 260)])).toEqual([161]);
		expect(gaps([...every(60, 0, 600), ...every(60, 780, 1200)])).toEqual([]);
		expect(gaps([...every(60, 0, 600), ...every(60, 781, 1200)])).toEqual([781]);
	});

	it('are not made by a logger that changes its pace', () => {
		expect(gaps([...every(300, 0, 3000), ...every(5, 3005, 3600), ...every(300, 3900, 6000)])).toEqual([]);
	});
});
