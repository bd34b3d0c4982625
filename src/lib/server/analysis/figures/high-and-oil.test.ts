import { describe, expect, it } from 'vitest';
import { inventedContext } from '../testing/context';
import type { Shape } from '../testing/synthetic-log';
import { readInstants, readMargin, readMosts, readOilNet, readOilSlopes } from './high-and-oil';
import { emptyFigures } from './sheet';

const shapes: Record<string, Shape> = {
	oilTemp: (_, s) => (Number.isNaN(s) ? 30 : 40 + s / 360),
	condSaturation: (_, s) => (Number.isNaN(s) ? 20 : Math.min(36, 20 + s / 5)),
	evapSaturation: () => 5,
	condPressure: (_, s) => (Number.isNaN(s) ? 500 : 500 + 5 * s),
	evapPressure: () => 350,
	oilPressure: (_, s) => (Number.isNaN(s) ? 350 : 350 + Math.max(0, 200 - s))
};
function read(seconds: number, spacing: number) {
	const sheet = emptyFigures();
	const context = inventedContext(seconds, spacing, shapes);
	for (const one of [readInstants, readMargin, readMosts, readOilNet, readOilSlopes]) one(context, sheet);
	return sheet;
}

// Every value is worked by hand from the shapes.
describe('margin', () => {
	it('is read from 60 s to the stop, from 10 s in a run under 90 s', () => {
		// At 60 s: 40.17 − 32; least at 80 s: 40.22 − 36.
		expect(read(1800, 5).figures.minMargin).toBeCloseTo(40 + 80 / 360 - 36, 9);
		expect(read(1800, 5).figures.maxMargin).toBeCloseTo(40 + 1795 / 360 - 36, 9);
		expect(read(60, 5).figures.maxMargin).toBeCloseTo(40 + 10 / 360 - 22, 9);
		expect(read(9, 3).absent.minMargin?.reason).toBe('run-too-short');
	});

	it('has its slope over 5–20 min in K/h', () => {
		expect(read(1800, 5).figures.oilTempSlope).toBeCloseTo(10, 6);
		expect(read(1800, 5).figures.marginSlope).toBeCloseTo(10, 6);
		expect(read(500, 5).absent.oilTempSlope?.reason).toBe('run-too-short');
	});
});

describe('instants', () => {
	it('take the nearest reading within one spacing', () => {
		const { figures } = read(600, 5);
		expect(figures.systemDeltaAt30s).toBe(300);
		expect(figures.systemDeltaAt60s).toBe(450);
		expect(figures.liftAtStart).toBe(27);
		// At 20 s spacing the rows are at 20 and 40 s: the earlier of two equally near.
		expect(read(600, 20).figures.systemDeltaAt30s).toBe(250);
	});

	it('say too short, or too coarse', () => {
		expect(read(40, 5).absent.liftAtStart?.reason).toBe('run-too-short');
		expect(read(1800, 300).absent.liftAtStart?.reason).toBe('too-coarse');
	});
});

describe('extremes', () => {
	it('take the most, and the least net oil pressure from 30 s', () => {
		const { figures } = read(150, 5);
		expect(figures.maxCondSaturation).toBe(36);
		expect(figures.maxOilTemp).toBeCloseTo(40 + 145 / 360, 9);
		expect(figures.minOilNet).toBe(55);
		expect(read(25, 5).absent.minOilNet?.reason).toBe('run-too-short');
	});
});
