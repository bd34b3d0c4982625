import { describe, expect, it } from 'vitest';
import type { Standing, SuspectKey, SuspectResult } from '$lib/model/suspect';
import { nextChecks } from './next-checks';
import { SUSPECT_TABLE } from './table';

/** An invented result: weight for it, its real check. */
function suspect(key: SuspectKey, weight: number, standing: Standing = 'fits'): SuspectResult {
	const check = SUSPECT_TABLE.find((row) => row.key === key)?.check;
	if (!check) throw new Error(`no row ${key}`);
	const clues = [{ key: 'x', direction: 'for' as const, weight, sentence: '', figures: {}, starts: [] }];
	return { key, rank: 1, standing, clues, decisiveCheck: check };
}

describe('nextChecks', () => {
	it('puts the check that splits the leading suspects before that of a weak one', () => {
		const checks = nextChecks([
			suspect('valve-underfeeding', 0.8),
			suspect('low-water-flow', 0.7),
			suspect('low-refrigerant-charge', 0.1)
		]);
		expect(checks.map(({ key }) => key)).toEqual(['valve-travel', 'shell-pressure-drop', 'leak-search']);
		expect(checks[0]?.sentence).toBe('Parts valve underfeeding from low water flow and low refrigerant charge.');
	});

	it('takes the check with the unit running before one that stops it, when both split alike', () => {
		const checks = nextChecks([suspect('low-oil', 0.6), suspect('fouled-condenser', 0.6)]);
		expect(checks.map(({ unitOff }) => unitOff)).toEqual([false, true]);
	});

	it('confirms or clears a lone suspect, and takes what has anything for it when none stands', () => {
		expect(nextChecks([suspect('low-oil', 0.6)])[0]?.sentence).toBe('Confirms low oil, or clears it.');
		expect(nextChecks([suspect('low-oil', 0.1, 'cannot-tell')])).toHaveLength(1);
		expect(nextChecks([suspect('low-oil', 0.1, 'speaks-against')])).toEqual([]);
	});
});
