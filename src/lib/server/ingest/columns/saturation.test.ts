import { describe, expect, it } from 'vitest';
import { roughSaturation } from './saturation';

describe('roughSaturation', () => {
	// CoolProp 8.0.0, full equations of state (saturation-eos-table.json), kPa absolute at °C.
	it.each([
		['R-134a', -15, 163.9401],
		['R-134a', 5, 349.6586],
		['R-134a', 40, 1016.593],
		['R-134a', 60, 1681.7842],
		['R-1234ze(E)', 10, 308.3569],
		['R-123', 5, 40.8209],
		['R-22', 40, 1533.5797]
	] as const)('%s at %d °C', (refrigerant, t, p) => {
		expect(Math.abs((roughSaturation(refrigerant, p) ?? NaN) - t)).toBeLessThan(0.3);
	});
	it('has no answer where it knows no curve', () => {
		expect(roughSaturation('R-514A', 100)).toBeNull();
		expect(roughSaturation('R-134a', 0)).toBeNull();
	});
});
