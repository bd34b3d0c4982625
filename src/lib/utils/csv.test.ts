import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { toCsv } from './csv';

describe('toCsv', () => {
	// RFC 4180, sections 2.1, 2.6 and 2.7: CR LF, quotes around commas, doubled quotes.
	it('writes what another reader reads back', () => {
		const rows = [
			['KM-2', 'Alder "Old" Mill, hall 3', 0.25],
			['AL-1', 'two\nlines', null]
		];
		const text = toCsv(['tag', 'site', 'share'], rows);
		expect(Papa.parse(text, { skipEmptyLines: true }).data).toEqual([
			['tag', 'site', 'share'],
			['KM-2', 'Alder "Old" Mill, hall 3', '0.25'],
			['AL-1', 'two\nlines', '']
		]);
		expect(text.startsWith('tag,site,share\r\n')).toBe(true);
	});
	it('leaves negative numbers numbers, and keeps text from running as a formula', () => {
		expect(toCsv(['a', 'b'], [[-4.5, '=1+1']])).toBe("a,b\r\n-4.5,'=1+1\r\n");
	});
	it('prints no NaN', () => {
		expect(toCsv(['a'], [[NaN]])).toBe('a\r\n\r\n');
	});
});
