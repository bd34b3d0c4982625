import { expect, it } from 'vitest';
import { splitAbbreviations } from './abbreviations';

it('finds an abbreviation wherever it stands, and keeps the text whole', () => {
	const parts = splitAbbreviations('Cond. approach against evap. sat.');
	expect(parts.map(({ text }) => text).join('')).toBe('Cond. approach against evap. sat.');
	expect(parts.flatMap(({ means }) => means ?? [])).toEqual(['condenser', 'evaporator', 'saturation temperature']);
});

it('leaves words alone that only begin like one', () => {
	expect(splitAbbreviations('condensing, saturation, evaporator')).toEqual([
		{ text: 'condensing, saturation, evaporator', means: null }
	]);
});
