import { describe, expect, it } from 'vitest';
import {
	counted,
	formatBytes,
	formatCoverage,
	formatMeasure,
	formatNumber,
	formatRange,
	formatShare,
	formatStored,
	withUnit
} from './format';

// Expected strings are worked by hand from the look's rules for numbers.
describe('formatNumber', () => {
	it('prints a true minus, thousands and fixed decimals', () => {
		expect(formatNumber(-12.34, 1)).toBe('−12.3');
		expect(formatNumber(1234567)).toBe('1,234,567');
		expect(formatNumber(999.96, 1)).toBe('1,000.0');
	});
	it('signs only what is not zero after rounding', () => {
		expect(formatNumber(-0.04, 1)).toBe('0.0');
		expect(formatNumber(0.04, 1, { sign: true })).toBe('0.0');
		expect(formatNumber(3, 0, { sign: true })).toBe('+3');
	});
	it('refuses what is no number', () => {
		expect(() => formatNumber(NaN)).toThrow(RangeError);
	});
});

describe('quantities', () => {
	it('puts a space that does not break before the unit', () => {
		expect(withUnit('7', '%')).toBe('7\u00a0%');
		expect(withUnit('7', '')).toBe('7');
	});
	it('converts stored values: 0 °C is 32 °F, a difference of 5 K is 9 °F', () => {
		expect(formatStored(0, 'temperature', 'ip')).toBe('32.0\u00a0°F');
		expect(formatStored(5, 'temperatureDifference', 'ip', { sign: true })).toBe('+9.0\u00a0°F diff.');
		expect(formatStored(-1.06, 'temperature', 'si')).toBe('−1.1\u00a0°C');
	});
	it('prints pressures as gauge against the air of the site', () => {
		expect(formatStored(301.325, 'pressure', 'si')).toBe('200\u00a0kPa gauge');
		expect(formatStored(301.325, 'pressure', 'si', { air: 90.325 })).toBe('211\u00a0kPa gauge');
	});
	it('gives gpm and kPa no decimals', () => {
		expect(formatMeasure(281.4, 'gpm')).toBe('281\u00a0gpm');
		expect(formatMeasure(22.08, 'lps')).toBe('22.1\u00a0L/s');
	});
});

describe('shares, ranges, bytes and counts', () => {
	it('prints them as the sheets do', () => {
		expect(formatShare(0.2731)).toBe('27\u00a0%');
		expect(formatCoverage(0.99996)).toBe('99.9\u00a0%');
		expect(formatCoverage(1)).toBe('100\u00a0%');
		expect(formatCoverage(0.5)).toBe('50.0\u00a0%');
		expect(formatCoverage(0)).toBe('0\u00a0%');
		expect(formatRange('12', '18')).toBe('12–18');
		expect(formatBytes(310)).toBe('310\u00a0B');
		expect(formatBytes(75_200)).toBe('75\u00a0kB');
		expect(formatBytes(999_700)).toBe('1.0\u00a0MB');
		expect(formatBytes(6_440_000)).toBe('6.4\u00a0MB');
		expect(formatBytes(2_500_000_000)).toBe('2.50\u00a0GB');
		expect(counted(1, 'start')).toBe('1 start');
		expect(counted(2, 'start')).toBe('2 starts');
		expect(counted(3, 'try', 'tries')).toBe('3 tries');
	});
});
