import { describe, expect, it } from 'vitest';
import type { Site, Unit } from '$lib/model/wire/site-unit';
import type { Start } from '$lib/model/wire/start';
import { suspectsContext } from './suspects-context';

const start = (id: string, day: number, outcome: Start['outcome']) =>
	({ id, startedAt: `2031-02-0${day}T06:00:00Z`, outcome }) as Start;
const starts = [start('a', 1, 'held'), start('b', 2, 'tripped'), start('c', 3, 'held'), start('d', 4, 'tripped')];
const unit = {
	id: 'u',
	limits: { evapSaturationCutout: [{ value: -1, provenance: 'maker', validFrom: null }] }
} as Unit;
const context = suspectsContext(unit, { timeZone: 'UTC', altitude: null } as Site, starts);

describe('suspectsContext', () => {
	it('lays the latest held start before the tripped one underneath', () => {
		expect(context.heldBefore('2031-02-04T06:00:00Z')?.id).toBe('c');
		expect(context.heldBefore('2031-01-01T06:00:00Z')?.id).toBe('a');
		expect(context.heldBefore(null)).toBeNull();
	});
	it('knows the cut-out of the day, and the air of the site', () => {
		expect(context.cutoutAt('2031-02-04T06:00:00Z')).toBe(-1);
		// Standard atmosphere at sea level (ISO 2533), to three decimals.
		expect(context.air).toBeCloseTo(101.325, 3);
	});
});
