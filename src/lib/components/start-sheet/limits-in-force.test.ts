import { describe, expect, it } from 'vitest';
import { limitsInForce } from './limits-in-force';

describe('limitsInForce', () => {
	const changed = Date.UTC(2031, 0, 10);
	const limits = {
		evapSaturationCutout: [
			{ value: -1, provenance: 'maker' as const, validFrom: null },
			{ value: -2, provenance: 'given' as const, validFrom: '2031-01-10T00:00:00Z' }
		]
	};
	it('judges a start by the limit of its day', () => {
		expect(limitsInForce(limits, changed - 1).evapSaturationCutout?.value).toBe(-1);
		expect(limitsInForce(limits, changed).evapSaturationCutout?.value).toBe(-2);
	});
	it('falls back on this product’s own choice, and a person’s value beats it', () => {
		expect(limitsInForce({}, changed).firstStartRest).toMatchObject({ value: 21_600, provenance: 'ours' });
		const own = { firstStartRest: [{ value: 7200, provenance: 'given' as const, validFrom: null }] };
		expect(limitsInForce(own, changed).firstStartRest?.value).toBe(7200);
	});
	it('leaves out what is not known', () => {
		expect(limitsInForce(limits, changed).oilTempCutout).toBeUndefined();
	});
});
