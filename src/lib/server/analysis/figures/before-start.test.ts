import { describe, expect, it } from 'vitest';
import { inventedContext } from '../testing/context';
import type { Shape } from '../testing/synthetic-log';
import { readAroundStart, readBeforeStart } from './before-start';
import { emptyFigures, type FigureContext } from './sheet';

const shapes: Record<string, Shape> = {
	oilTemp: (t) => 40 - t / 1000,
	evapSaturation: () => 10,
	evapWaterOut: (_, s) => (Number.isNaN(s) ? 13 : 7),
	condWaterIn: (t) => t / 100
};
function read(
	spacing: number,
	change: (context: FigureContext) => FigureContext = (c) => c,
	more: Record<string, Shape> = {}
) {
	const sheet = emptyFigures();
	const context = change(inventedContext(600, spacing, { ...shapes, ...more }));
	readBeforeStart(context, sheet);
	readAroundStart(context, sheet);
	return sheet;
}

describe('before the start', () => {
	it('takes the last off sample', () => {
		// The start is at 3,600 s; the last row before it at 3,595 s.
		const { figures } = read(5);
		expect(figures.oilTempAtStart).toBeCloseTo(40 - 3.595, 9);
		expect(figures.waterOutAtStart).toBe(13);
		expect(figures.oilLiftAtStart).toBeCloseTo(26.405, 9);
	});

	it('gives no oil lift after a short or unknown rest', () => {
		expect(read(5, (c) => ({ ...c, restSeconds: 1799 })).absent.oilLiftAtStart?.reason).toBe('does-not-apply');
		expect(read(5, (c) => ({ ...c, restSeconds: null })).absent.oilLiftAtStart?.reason).toBe('no-rest');
	});

	it('says gap where nothing was read just before', () => {
		const gone: Shape = (t) => (t > 3000 && t < 3600 ? NaN : 40);
		expect(read(5, undefined, { oilTemp: gone }).absent.oilTempAtStart?.reason).toBe('gap');
	});

	it('takes the median of a minute to either side for condenser water', () => {
		expect(read(5).figures.condWaterInAtStart).toBeCloseTo(36, 9);
		expect(read(5).absent.outdoorAtStart?.reason).toBe('signal-missing');
	});
});
