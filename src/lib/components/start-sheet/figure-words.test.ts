import { describe, expect, it } from 'vitest';
import { FIGURE_KEYS } from '$lib/model/start';
import { LIMIT_KEYS } from '$lib/model/unit';
import { FIGURE_LIMITS, limitQuantity, measureOf, printFigure, printValue, PROTECTION_LIMITS } from './figure-words';

const ip = { temperature: '°F', temperatureDifference: '°F diff.', pressure: 'psia', temperatureRate: '°F/min' };

describe('printFigure', () => {
	it('prints in the answer’s units, differences without the word', () => {
		expect(printFigure('minEvapSaturation', 31.25, ip, 'ip')).toBe('31.3\u00a0°F');
		expect(printFigure('minMargin', 4.25, ip, 'ip')).toBe('+4.3\u00a0°F');
		expect(printFigure('headroom.evapSaturation', -2, {}, 'si')).toBe('−2.0\u00a0K');
	});
	it('prints times as times', () => {
		expect(printFigure('timeTo50Seconds', 95, {}, 'si')).toBe('1:35 in');
		expect(printFigure('secondsBelowCutout', 12, {}, 'si')).toBe('12\u00a0s');
		expect(printFigure('settledSeconds', 1500, {}, 'si')).toBe('25\u00a0min');
	});
	it('has a way to print every figure', () => {
		for (const key of FIGURE_KEYS) expect(printFigure(key, 1.5, {}, 'si')).toMatch(/\d/);
	});
});

describe('printValue and measureOf', () => {
	it('keeps an answer’s absolute pressure absolute', () => {
		expect(measureOf('pressure', ip, 'ip')).toBe('psia');
		expect(printValue(31, 'pressure', ip, 'ip')).toBe('31.0\u00a0psia');
	});
});

describe('limits', () => {
	it('have a quantity that suits their figure or protection', () => {
		expect(limitQuantity('evapSaturationCutout')).toBe('temperature');
		expect(limitQuantity('marginCutout')).toBe('temperatureDifference');
		expect(limitQuantity('suctionPressureCutout')).toBe('pressure');
		expect(limitQuantity('oilNetCutout')).toBe('pressureDifference');
		expect(limitQuantity('firstStartRest')).toBe('duration');
		expect(limitQuantity('startCapacityUsualHigh')).toBe('percent');
	});
	it('are known limits', () => {
		const known = new Set<string>(LIMIT_KEYS);
		for (const key of [...Object.values(FIGURE_LIMITS).flat(), ...Object.values(PROTECTION_LIMITS)])
			expect(known.has(key)).toBe(true);
	});
});
