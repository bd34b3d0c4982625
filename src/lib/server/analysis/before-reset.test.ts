import { TRIP_KINDS } from '$lib/model/start';
import { describe, expect, it } from 'vitest';
import { beforeReset } from './before-reset';

describe('beforeReset', () => {
	it('allows no restart after electrical, winding, oil-flow, emergency-stop and detector trips (product.md, "Cautions")', () => {
		const never = TRIP_KINDS.filter((kind) => !beforeReset(kind, 1, null).restartAllowed);
		expect(never.sort()).toEqual([
			'emergency-stop',
			'motor-temperature',
			'oil-flow',
			'phase-or-supply',
			'refrigerant-detector',
			'starter-fault'
		]);
	});
	it('counts starts against the maker’s allowance, and stops where it is spent', () => {
		expect(beforeReset('high-condensing', 2, 4).restartAllowed).toBe(true);
		const spent = beforeReset('high-condensing', 4, 4);
		expect(spent.restartAllowed).toBe(false);
		expect(spent.advice.at(-1)).toContain('4 of 4');
	});
	it('names the qualified person first for every kind', () => {
		for (const kind of TRIP_KINDS) expect(beforeReset(kind, 1, null).cautions[0]).toMatch(/^Only qualified people/);
	});
});
