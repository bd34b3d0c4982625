import { describe, expect, it } from 'vitest';
import { inventedContext } from '../testing/context';
import { MIDNIGHT, type Shape } from '../testing/synthetic-log';
import { readSettled, settledStretch } from './settled';
import { emptyFigures } from './sheet';

/** Seconds from the start of a stretch. */
const since = (stretch: ReturnType<typeof settledStretch>) =>
	'from' in stretch ? [stretch.from, stretch.to].map((at) => (at - MIDNIGHT) / 1000 - 3600) : stretch.reason;
/** Loads by 2 points/min until 1,800 s, then stands. */
const capacity: Shape = (_, s) => (Number.isNaN(s) ? 0 : Math.min(40 + s / 30, 100));
const still: Shape = () => 7;

describe('settledStretch', () => {
	it('is the longest calm after 10 min, up to 30 s before the stop', () => {
		const [from, to] = since(settledStretch(inventedContext(3600, 5, { capacity, evapWaterOut: still }))) as number[];
		// A 5-min window that begins where the ramp ends is calm; one that holds half a minute or so of ramp still is.
		expect(from).toBeGreaterThan(1600);
		expect(from).toBeLessThanOrEqual(1800);
		expect(to).toBe(3570);
	});

	it('begins no sooner than 10 min in', () => {
		expect(since(settledStretch(inventedContext(2000, 5, { capacity: () => 60, evapWaterOut: still })))).toEqual([
			600, 1950
		]);
	});

	it('waits for the water too, and does without one of the two', () => {
		const falling: Shape = (_, s) => (Number.isNaN(s) ? 12 : 12 - s / 300);
		expect(since(settledStretch(inventedContext(3600, 5, { capacity: () => 60, evapWaterOut: falling })))).toBe(
			'no-settled-stretch'
		);
		expect(since(settledStretch(inventedContext(3600, 5, { evapWaterOut: still })))).toEqual([600, 3570]);
	});

	it('says why there is none', () => {
		expect(since(settledStretch(inventedContext(900, 5, { capacity })))).toBe('run-too-short');
		expect(since(settledStretch(inventedContext(3600, 5, {})))).toBe('signal-missing');
	});

	it('is found at 60 s and at 300 s too', () => {
		for (const spacing of [60, 300]) {
			expect(
				since(settledStretch(inventedContext(7200, spacing, { capacity: () => 60, evapWaterOut: still })))
			).not.toBeTypeOf('string');
		}
	});
});

describe('readSettled', () => {
	it('takes medians of the stretch, and power for each duty', () => {
		const shapes: Record<string, Shape> = {
			capacity: () => 60,
			evapWaterOut: still,
			evapWaterIn: () => 12,
			evapFlow: () => 20,
			power: () => 84,
			evapSaturation: () => 4
		};
		const context = inventedContext(3600, 5, shapes);
		const sheet = emptyFigures();
		readSettled(context, sheet, settledStretch(context));
		expect(sheet.figures.evapApproach).toBe(3);
		expect(sheet.figures.evapDelta).toBe(5);
		expect(sheet.figures.flow).toBe(20);
		// 20 L/s × 4.196 × 5 K = 419.6 kW; 84 kW of power.
		expect(sheet.figures.powerPerDuty).toBeCloseTo(0.2, 3);
		expect(sheet.figures.settledSeconds).toBe(2970 - 0);
		expect(sheet.absent.settledMargin?.reason).toBe('signal-missing');
	});

	it('does not apply a condenser approach to an air-cooled unit', () => {
		const context = inventedContext(3600, 5, { capacity: () => 60 }, { nature: { condenser: 'air' } });
		const sheet = emptyFigures();
		readSettled(context, sheet, settledStretch(context));
		expect(sheet.absent.condApproach?.reason).toBe('does-not-apply');
	});
});
