import { expect, it } from 'vitest';
import { DAY, MONDAY } from '../../../../../fixtures/inference/start-record';
import { failingKind, nextStartChances, organisationPrior, weightedTries, type UnitTries } from './next-start';

const tries = (outcomes: string, kind = 'low-evaporator-saturation' as const): UnitTries['tries'] =>
	[...outcomes].map((mark, i) => ({ at: MONDAY + i * DAY, tripped: mark === 't', kind: mark === 't' ? kind : null }));

it('halves a weight in a fortnight (by hand)', () => {
	const { k, m } = weightedTries(tries('t'), MONDAY + 14 * DAY);
	expect([k, m]).toEqual([0.5, 0.5]);
	expect(weightedTries(tries('tc'), MONDAY + DAY).m).toBeCloseTo(1 + 2 ** (-1 / 14), 12);
});

it('knows the failing kind and counts others as first tries only', () => {
	const mixed: UnitTries['tries'] = [...tries('tt'), { at: MONDAY + 3 * DAY, tripped: true, kind: 'high-condensing' }];
	expect(failingKind(mixed)).toBe('low-evaporator-saturation');
	expect(failingKind(tries('cc'))).toBeNull();
});

it("takes Jeffreys' prior for fewer than five units: 1 of 1 has mean 0.75 (by hand)", () => {
	const chance = nextStartChances([{ unit: 'A', tries: tries('t') }], MONDAY).get('A');
	expect(chance?.chance).toBeCloseTo(0.75, 12);
	expect(chance?.tenth).toBeLessThan(0.75);
});

it('pools five units and more: alike units get a firm prior, unlike ones a loose one', () => {
	const alike = organisationPrior(Array.from({ length: 8 }, () => ({ k: 2, m: 20 })));
	const unlike = organisationPrior([0, 0, 0, 18, 0, 19].map((k) => ({ k, m: 20 })));
	expect(alike.a + alike.b).toBe(20);
	expect(unlike.a + unlike.b).toBe(2);
});
