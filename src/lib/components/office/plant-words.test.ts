import { expect, it } from 'vitest';
import { deliveryChoices, importWords } from './plant-words';

it('says what an import did', () => {
	expect(importWords({ sites: 1, units: 2, known: 0 })).toBe('1 site and 2 units added.');
	expect(importWords({ sites: 0, units: 0, known: 1 })).toBe('Nothing new; 1 unit there already, left alone.');
	expect(importWords({ sites: 0, units: 1, known: 3 })).toBe(
		'0 sites and 1 unit added; 3 units there already, left alone.'
	);
});

it('keeps a delivery that is none of the usual ones', () => {
	expect(deliveryChoices(24).map(({ value }) => value)).toEqual(['', '1', '6', '24', '168']);
	expect(deliveryChoices(null)).toHaveLength(5);
	expect(deliveryChoices(48).at(-1)).toEqual({ value: '48', label: 'every 48 h' });
});
