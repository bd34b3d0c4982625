import { describe, expect, it } from 'vitest';
import { LIMIT_ORDER, LIMIT_QUANTITIES, TWIN_SCREW_PRESET } from './limit-quantities';
import { fromStored } from './quantities';
import { LIMIT_KEYS } from './unit';

describe('limit quantities', () => {
	it('knows every limit once', () => {
		expect([...LIMIT_ORDER].sort()).toEqual([...LIMIT_KEYS].sort());
	});
});

describe('the preset of a twin screw', () => {
	// Common practice, no source: about 8 °F of margin at the start, oil up to 140 °F, sensors within 2 °F.
	it('stores what people say in °F', () => {
		const value = (key: string) => TWIN_SCREW_PRESET.find((entry) => entry.key === key)?.value ?? NaN;
		expect(fromStored(value('marginUsualAtStart'), 'degFdiff')).toBeCloseTo(8, 9);
		expect(fromStored(value('oilTempUsualHigh'), 'degF')).toBeCloseTo(140, 9);
		expect(fromStored(value('pairedSensorTolerance'), 'degFdiff')).toBeCloseTo(2, 9);
	});
	it('claims no maker’s number, and no cut-out', () => {
		expect(TWIN_SCREW_PRESET.every((entry) => entry.provenance !== 'maker')).toBe(true);
		expect(TWIN_SCREW_PRESET.some((entry) => entry.key.includes('Cutout'))).toBe(false);
		expect(TWIN_SCREW_PRESET.every((entry) => entry.key in LIMIT_QUANTITIES)).toBe(true);
	});
});
