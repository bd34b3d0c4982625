import { describe, expect, it } from 'vitest';
import { goodStretches, sliding } from './sliding';

describe('sliding', () => {
	const t = Float64Array.from({ length: 50 }, (_, i) => 1e12 + i * 5000);

	it('fits a line over any stretch', () => {
		const { fit, fitWithin, mostBefore } = sliding({ t, v: t.map((_, i) => 80 - i * 0.5) });
		expect(fit(10, 30)?.slope).toBeCloseTo(-0.1, 9);
		expect(fit(10, 30)?.mean).toBeCloseTo(80 - 9.75, 9);
		// Deviation of 20 even steps of 0.5: 0.5·√((20² − 1)/12).
		expect(fit(10, 30)?.deviation).toBeCloseTo(0.5 * Math.sqrt(399 / 12), 9);
		expect(fit(3, 4)).toBeNull();
		expect(fitWithin(1e12, 1e12 + 245_000, 1)?.slope).toBeCloseTo(-0.1, 9);
		expect(fitWithin(1e12, 1e12 + 1_000_000, 0.6)).toBeNull();
		expect(mostBefore(1e12 + 60_000)).toBe(80);
		expect(mostBefore(0)).toBe(-Infinity);
	});
});

describe('goodStretches', () => {
	it('joins windows of one unbroken row of steps and parts the others', () => {
		const good = (from: number) => from <= 60 || (from >= 200 && from <= 210);
		expect(goodStretches(0, 400, 100, 10, good)).toEqual([
			{ from: 0, to: 160 },
			{ from: 200, to: 310 }
		]);
		expect(goodStretches(0, 50, 100, 10, () => true)).toEqual([]);
	});
});
