import { describe, expect, it } from 'vitest';
import { flowFromDrop } from './flow-curve';

describe('flowFromDrop', () => {
	it('follows the square root from one point (worked by hand: a quarter of the drop, half the flow)', () => {
		expect(flowFromDrop(40, [{ drop: 40, flow: 30 }])).toBeCloseTo(30, 10);
		expect(flowFromDrop(20, [{ drop: 40, flow: 30 }])).toBeCloseTo(30 / Math.SQRT2, 10);
	});

	it('goes through every point of a curve and rises between them', () => {
		const curve = [
			{ drop: 60, flow: 36 },
			{ drop: 10, flow: 14 },
			{ drop: 30, flow: 25 }
		];
		for (const point of curve) expect(flowFromDrop(point.drop, curve)).toBeCloseTo(point.flow, 9);
		const between = flowFromDrop(45, curve) ?? 0;
		expect(between).toBeGreaterThan(25);
		expect(between).toBeLessThan(36);
	});

	it('says nothing far outside the curve, without one, or without a drop', () => {
		expect(flowFromDrop(200, [{ drop: 40, flow: 30 }])).toBeNull();
		expect(flowFromDrop(10, [{ drop: 40, flow: 30 }])).toBeNull();
		expect(flowFromDrop(10, [])).toBeNull();
		expect(flowFromDrop(0, [{ drop: 40, flow: 30 }])).toBeNull();
	});
});
