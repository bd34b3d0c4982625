import { describe, expect, it } from 'vitest';
import { FIGURE_KEYS, OUTCOMES, PROTECTIONS, TRIP_KINDS } from './start';
import { SUSPECT_KEYS } from './suspect';
import { LIMIT_KEYS } from './unit';
import { FIGURE_WORDS, LIMIT_WORDS, OUTCOME_WORDS, PROTECTION_WORDS, SUSPECT_WORDS, TRIP_KIND_WORDS } from './words';

describe('words', () => {
	it.each([
		['figures', FIGURE_KEYS, FIGURE_WORDS],
		['trip kinds', TRIP_KINDS, TRIP_KIND_WORDS],
		['suspects', SUSPECT_KEYS, SUSPECT_WORDS],
		['protections', PROTECTIONS, PROTECTION_WORDS],
		['outcomes', OUTCOMES, OUTCOME_WORDS]
	])('name every one of the %s, and no two alike', (_, keys, words: Record<string, string>) => {
		const said = keys.map((key) => words[key]);
		expect(said.every((word) => typeof word === 'string' && word.length > 0)).toBe(true);
		expect(new Set(said).size).toBe(keys.length);
	});
	it('name every limit', () => {
		for (const key of LIMIT_KEYS) expect(LIMIT_WORDS[key]).toMatch(/\S/);
	});
});
