import { describe, expect, it } from 'vitest';
import type { Series, SeriesMap } from '$lib/model/series';
import { saturationPressure } from '../refrigerants/saturation';
import { deriveSeries, join2, saturationsOf } from './derived';

const t = Float64Array.of(0, 5000, 10_000);
const row = (...v: number[]): Series => ({ t, v: Float64Array.from(v), logging: 'interval' });
const minus = (a: number, b: number) => a - b;

describe('join2', () => {
	it('joins aligned rows and keeps a blank blank', () => {
		expect(Array.from(join2(row(5, NaN, 7), row(1, 2, NaN), minus).v)).toEqual([4, NaN, NaN]);
	});

	it('takes the other signal while it is no older than its own spacing', () => {
		const slow: Series = {
			t: Float64Array.of(0, 60_000, 240_000, 300_000, 360_000),
			v: Float64Array.of(1, 2, 3, 4, 5),
			logging: 'interval'
		};
		const fast: Series = {
			t: Float64Array.from({ length: 13 }, (_, i) => i * 30_000),
			v: new Float64Array(13).fill(10),
			logging: 'interval'
		};
		const joined = join2(fast, slow, minus);
		expect(joined.t).toBe(fast.t);
		// At 150 to 210 s the reading of 60 s is older than its 60 s: absent, not carried.
		expect(Array.from(joined.v)).toEqual([9, 9, 8, 8, 8, NaN, NaN, NaN, 7, 7, 6, 6, 5]);
	});
});

describe('saturations', () => {
	const pressure = (celsius: number, refrigerant: 'R-134a' | 'R-407C', side: 'dew' | 'bubble' = 'dew') =>
		saturationPressure(refrigerant, celsius, side) ?? NaN;

	it('come from pressure where only that is logged, with a note', () => {
		const map: SeriesMap = { evapPressure: row(...[4, 5, 6].map((c) => pressure(c, 'R-134a'))) };
		const found = saturationsOf(map, 'R-134a');
		expect(found.evap?.v[1]).toBeCloseTo(5, 6);
		expect(found.notes).toHaveLength(1);
		expect(saturationsOf({ ...map, evapSaturation: row(1, 2, 3) }, 'R-134a').evap?.v[1]).toBe(2);
	});

	it('cannot tell the margin of a logged saturation of unknown side with a glide', () => {
		const map: SeriesMap = { condSaturation: row(38, 38, 38), oilTemp: row(45, 45, 45) };
		expect(deriveSeries('margin', map, saturationsOf(map, 'R-407C'), {})).toBeUndefined();
		expect(deriveSeries('margin', map, saturationsOf(map, 'R-134a'), {})?.v[0]).toBe(7);
		const withPressure: SeriesMap = { ...map, condPressure: row(...[40, 40, 40].map((c) => pressure(c, 'R-407C'))) };
		expect(deriveSeries('margin', withPressure, saturationsOf(withPressure, 'R-407C'), {})?.v[0]).toBeCloseTo(5, 6);
	});
});

describe('deriveSeries', () => {
	it('works each quantity out from its parts, worked by hand', () => {
		const map: SeriesMap = {
			suctionTemp: row(9, 9, 9),
			evapSaturation: row(4, 4, 4),
			condSaturation: row(36, 36, 36),
			dischargeTemp: row(52, 52, 52),
			liquidTemp: row(31, 31, 31),
			evapWaterIn: row(12, 12, 12),
			evapWaterOut: row(7, 7, 7),
			condWaterOut: row(34, 34, 34),
			oilTemp: row(41, 41, 41),
			condPressure: row(900, 900, 900),
			evapPressure: row(340, 340, 340),
			oilPressure: row(800, 800, 800),
			evapFlow: row(20, 20, NaN)
		};
		const saturations = saturationsOf(map, 'R-134a');
		const value = (key: Parameters<typeof deriveSeries>[0]) => deriveSeries(key, map, saturations, {})?.v[0];
		expect(value('superheat')).toBe(5);
		expect(value('dischargeSuperheat')).toBe(16);
		expect(value('subcooling')).toBe(5);
		expect(value('evapApproach')).toBe(3);
		expect(value('condApproach')).toBe(2);
		expect(value('margin')).toBe(5);
		expect(value('lift')).toBe(32);
		expect(value('systemDelta')).toBe(560);
		expect(value('oilNet')).toBe(460);
		expect(value('evapDelta')).toBe(5);
		// 20 L/s × 0.9999 kg/L × 4.196 kJ/(kg·K) × 5 K.
		expect(value('duty')).toBeCloseTo(419.6, 0);
		expect(deriveSeries('duty', map, saturations, {})?.v[2]).toBeNaN();
		expect(deriveSeries('margin', {}, saturationsOf({}, 'R-134a'), {})).toBeUndefined();
	});
});
