import { describe, expect, it } from 'vitest';
import { HOME_WINDOW, oneSpeedScale, toPixel, toSeconds, twoSpeedScale } from './paper-scale';

describe('twoSpeedScale', () => {
	const scale = twoSpeedScale(704);

	it('gives the first minutes two thirds of the paper (worked by hand: 700 px of paper, 462 fast)', () => {
		expect(scale.fastEnd).toBe(462);
		expect(scale.slowBegin).toBe(466);
		expect(toPixel(scale, -60)).toBe(0);
		expect(toPixel(scale, 240)).toBe(462);
		expect(toPixel(scale, 2400)).toBe(704);
		// 300 s on 462 px against 2,160 s on 238 px
		expect(scale.ratio).toBeCloseTo(2160 / 238 / (300 / 462), 9);
	});

	it('finds its way back from every pixel, and reads the bare frame as the break', () => {
		for (const s of [-60, 0, 37, 240, 600, 2399]) expect(toSeconds(scale, toPixel(scale, s))).toBeCloseTo(s, 9);
		expect(toSeconds(scale, 464)).toBe(240);
	});

	it('rises without a fold', () => {
		let last = -Infinity;
		for (let s = HOME_WINDOW.from; s <= HOME_WINDOW.to; s += 7) {
			expect(toPixel(scale, s)).toBeGreaterThan(last);
			last = toPixel(scale, s);
		}
	});

	it('refuses paper without room or a break outside', () => {
		expect(() => twoSpeedScale(4)).toThrow(RangeError);
		expect(() => twoSpeedScale(700, { from: 300, to: 400 })).toThrow(/cannot slow/);
	});
});

describe('oneSpeedScale', () => {
	it('is even', () => {
		const scale = oneSpeedScale(200, { from: 0, to: 100 });
		expect(toPixel(scale, 25)).toBe(50);
		expect(toSeconds(scale, 50)).toBe(25);
		expect(scale.ratio).toBe(1);
	});
	it('refuses an empty window', () => {
		expect(() => oneSpeedScale(200, { from: 5, to: 5 })).toThrow(/empty/);
		expect(() => oneSpeedScale(0, { from: 0, to: 5 })).toThrow(/0 px/);
	});
});
