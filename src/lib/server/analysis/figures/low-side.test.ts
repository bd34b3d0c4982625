import { describe, expect, it } from 'vitest';
import { DEFAULT_LIMITS, type LimitHistory } from '$lib/model/unit';
import { inventedContext } from '../testing/context';
import type { Shape } from '../testing/synthetic-log';
import {
	readBelowCutout,
	readLeastSaturation,
	readLeastSuperheats,
	readPullDown,
	readSteepestFall,
	readValve,
	steepestSlope,
	timeBelow
} from './low-side';
import { emptyFigures } from './sheet';

const cutout = (value: number, bypass?: number): LimitHistory => ({
	...DEFAULT_LIMITS,
	evapSaturationCutout: [{ value, provenance: 'given', validFrom: -Infinity }],
	...(bypass === undefined ? {} : { startBypass: [{ value: bypass, provenance: 'given', validFrom: -Infinity }] })
});
/** A dip: from 10 °C by 0.2 K/s to 0 °C at 50 s, back by 0.1 K/s to 5 °C at 100 s. */
const dip: Shape = (_, s) => (Number.isNaN(s) ? 10 : s <= 50 ? 10 - 0.2 * s : Math.min(5, 0.1 * (s - 50)));

describe('timeBelow', () => {
	// Worked by hand: from 2 to −2 in 10 s and back in 20 s, level 0: 5 + 10 s, areas 5·2/2 + 10·2/2.
	it('takes crossings on the straight line', () => {
		const t = Float64Array.of(0, 10_000, 30_000, 40_000);
		const below = timeBelow({ t, v: Float64Array.of(2, -2, 2, 2) }, 0);
		expect(below).toEqual({ seconds: 15, degreeSeconds: 15, recovery: 15 });
	});

	it('counts nothing over a gap, and knows no recovery that was not seen', () => {
		const t = Float64Array.of(0, 10_000, 200_000);
		expect(timeBelow({ t, v: Float64Array.of(1, -1, -1) }, 0)).toEqual({
			seconds: 5,
			degreeSeconds: 2.5,
			recovery: null
		});
	});
});

describe('the low side of an invented dip', () => {
	const read = (spacing: number, limits: LimitHistory = DEFAULT_LIMITS) => {
		const sheet = emptyFigures();
		const context = inventedContext(600, spacing, { evapSaturation: dip }, { limits });
		readLeastSaturation(context, sheet);
		readSteepestFall(context, sheet);
		readBelowCutout(context, sheet);
		return sheet;
	};

	it('gives the least and when, and the steepest fall as a negative slope', () => {
		const { figures } = read(5);
		expect(figures.minEvapSaturation).toBeCloseTo(0, 9);
		expect(figures.minEvapSaturationAtSeconds).toBe(50);
		expect(figures.steepestFall).toBeCloseTo(-12, 9);
		expect(read(30).figures.steepestFall).toBeCloseTo(-12, 9);
		expect(read(60).absent.steepestFall?.reason).toBe('too-coarse');
	});

	it('measures the time below the cut-out after the bypass', () => {
		// Under 2 °C from 40 s to 70 s; area 10·2/2 + 20·2/2.
		const { figures } = read(5, cutout(2));
		expect(figures.secondsBelowCutout).toBeCloseTo(30, 9);
		expect(figures.degreeSecondsBelowCutout).toBeCloseTo(30, 9);
		expect(figures.recoverySeconds).toBeCloseTo(30, 9);
		expect(read(5, cutout(2, 60)).figures.secondsBelowCutout).toBeCloseTo(10, 9);
	});

	it('says no limit, too coarse, or never under', () => {
		expect(read(5).absent.secondsBelowCutout?.reason).toBe('no-limit');
		expect(read(20, cutout(2)).absent.secondsBelowCutout?.reason).toBe('too-coarse');
		expect(read(15, cutout(2)).figures.secondsBelowCutout).not.toBeNull();
		expect(read(5, cutout(-3)).figures.secondsBelowCutout).toBe(0);
		expect(read(5, cutout(-3)).absent.recoverySeconds?.reason).toBe('does-not-apply');
	});
});

describe('steepestSlope', () => {
	it('needs readings 15 s apart within 30 s', () => {
		const at = (...s: number[]) => ({
			t: Float64Array.from(s, (x) => x * 1000),
			v: Float64Array.from(s, (x) => -x / 10)
		});
		expect(steepestSlope(at(0, 5, 10))).toBeNull();
		expect(steepestSlope(at(0, 31))).toBeNull();
		expect(steepestSlope(at(0, 15))).toBeCloseTo(-6, 9);
	});
});

describe('superheat, valve and pull-down', () => {
	const shapes: Record<string, Shape> = {
		suctionTemp: (_, s) => (Number.isNaN(s) ? 20 : 8 + (s < 60 ? -6 : s < 120 ? 2 : 4)),
		evapSaturation: () => 4,
		valvePosition: (_, s) => (Number.isNaN(s) ? 0 : s < 300 ? 100 : 50),
		evapWaterOut: (_, s) => (Number.isNaN(s) ? 14 : 14 - s / 100)
	};
	const sheet = emptyFigures();
	const context = inventedContext(600, 5, shapes);
	for (const readOne of [readLeastSuperheats, readValve, readPullDown]) readOne(context, sheet);

	it('reads the least superheat from 60 s on', () => {
		expect(sheet.figures.minSuperheat).toBe(6);
		expect(sheet.absent.minDischargeSuperheat?.detail).toBe(
			'The log has no discharge temperature and condensing saturation.'
		);
	});

	it('weighs the valve by time', () => {
		expect(sheet.figures.maxValvePosition).toBe(100);
		expect(sheet.figures.meanValvePosition).toBeCloseTo(75, 9);
		expect(sheet.figures.secondsAtValveLimit).toBe(300);
	});

	it('gives the pull-down as a negative slope, K/min, over a minute at least', () => {
		expect(sheet.figures.pullDownRate).toBeCloseTo(-0.6, 9);
		const short = emptyFigures();
		readPullDown(inventedContext(100, 5, shapes), short);
		expect(short.absent.pullDownRate?.reason).toBe('run-too-short');
		const coarse = emptyFigures();
		readPullDown(inventedContext(1200, 300, shapes), coarse);
		expect(coarse.absent.pullDownRate?.reason).toBe('too-coarse');
	});
});
