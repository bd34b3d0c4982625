import { describe, expect, it } from 'vitest';
import { limitInput, limitShown, limitStored, limitText, limitUnit, readNumber } from './limit-form';

const AIR = 101.325;

describe('limits in a person’s units of measure', () => {
	// Worked by hand: 0 °C is 32 °F; 127 mm is 5 in; 10 K·s is 18 °F·s.
	it('shows and takes the same number', () => {
		expect(limitShown('freezeLimit', 0, 'ip', AIR)).toBe(32);
		expect(limitShown('oilLevelLow', 127, 'ip', AIR)).toBeCloseTo(5, 9);
		expect(limitShown('cutoutDegreeSeconds', 10, 'ip', AIR)).toBe(18);
		for (const key of ['freezeLimit', 'oilLevelLow', 'cutoutDegreeSeconds', 'suctionPressureCutout'] as const)
			expect(limitStored(key, limitShown(key, 210, 'ip', AIR), 'ip', AIR)).toBeCloseTo(210, 9);
	});
	it('prints pressures as gauges read, against the site’s air', () => {
		expect(limitText('suctionPressureCutout', 301.325, 'si', AIR)).toBe('200\u00a0kPa gauge');
		expect(limitUnit('suctionPressureCutout', 'ip')).toBe('psig');
	});
	it('prints windows as times and margins with their sign', () => {
		expect(limitText('startUpWindow', 900, 'si', AIR)).toBe('15\u00a0min');
		expect(limitText('marginUsualAtStart', 4, 'si', AIR)).toBe('+4.0\u00a0K');
	});
	it('begins a form with a plain number', () => {
		expect(limitInput('freezeLimit', 1.5, 'si', AIR)).toBe('1.5');
		expect(limitInput('oilLevelLow', 127, 'ip', AIR)).toBe('5');
	});
});

describe('readNumber', () => {
	it('takes a comma, a point and either minus', () => {
		expect(readNumber(' −2,5 ')).toBe(-2.5);
		expect(readNumber('+3.25')).toBe(3.25);
	});
	it('takes nothing else', () => {
		for (const text of ['', '1e5', '2.5.1', '28 °F', '0x10']) expect(readNumber(text)).toBeNull();
	});
});
