import { describe, expect, it } from 'vitest';
import { axisClock, timeTicks, valueTicks } from './axis-ticks';
import { oneSpeedScale, twoSpeedScale } from './paper-scale';

describe('axisClock', () => {
	it('prints whole minutes bare and seconds after a colon, with a true minus', () => {
		expect([-60, -30, 0, 45, 60, 150, 2400].map(axisClock)).toEqual(['−1', '−0:30', '0', '0:45', '1', '2:30', '40']);
		expect(axisClock(-0.2)).toBe('0');
	});
});

describe('timeTicks', () => {
	it('labels whole minutes on the fast paper and tens on the slow, the break once', () => {
		const labels = timeTicks(twoSpeedScale(704)).filter((t) => t.label !== '');
		expect(labels.map((t) => t.label)).toEqual(['−1', '0', '1', '2', '3', '4', '10', '20', '30', '40']);
	});
	it('keeps labels apart at every width', () => {
		for (const width of [290, 500, 700, 1100])
			for (const scale of [twoSpeedScale(width), oneSpeedScale(width, { from: 17, to: 171 })]) {
				const xs = timeTicks(scale)
					.filter((t) => t.label !== '')
					.map((t) => t.x);
				for (let k = 1; k < xs.length; k++) expect((xs[k] ?? 0) - (xs[k - 1] ?? 0)).toBeGreaterThan(27);
			}
	});
	it('zoomed close in, counts seconds', () => {
		const labels = timeTicks(oneSpeedScale(600, { from: 100, to: 130 })).map((t) => t.label);
		expect(labels).toContain('1:45');
	});
});

describe('valueTicks', () => {
	it('takes round steps, four ticks at most', () => {
		const { ticks } = valueTicks([22.8, 66.1]);
		expect(ticks).toEqual([30, 40, 50, 60]);
		expect(valueTicks([0, 104]).ticks).toEqual([0, 50, 100]);
		expect(valueTicks([-23, 26]).ticks.length).toBeLessThanOrEqual(4);
	});
	it('covers every value with room to spare', () => {
		const { low, high } = valueTicks([3, Number.NaN, 9]);
		expect(low).toBeLessThan(3);
		expect(high).toBeGreaterThan(9);
	});
	it('does not blow up noise, and draws an empty axis for nothing', () => {
		const { low, high } = valueTicks([50, 50.01], 4, 10);
		expect(high - low).toBeGreaterThanOrEqual(10);
		expect(valueTicks([]).ticks).toContain(0);
	});
	it('ends where all values are one and no least span is asked for', () => {
		expect(valueTicks([0, 0], 4, 0).ticks).toContain(0);
		expect(valueTicks([7, 7], 4, 0)).toMatchObject({ ticks: [4, 6, 8, 10] });
	});
});
