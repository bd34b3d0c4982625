import { expect, it } from 'vitest';
import { csvCell, csvRow } from './csv';

it('quotes as RFC 4180, section 2, rules 5 to 7 ask', () => {
	expect(csvRow(['aaa', 'b "x" bb', 'c,c', 'line\nbreak', null])).toBe('aaa,"b ""x"" bb","c,c","line\nbreak",\r\n');
});

it('defuses what a spreadsheet would run, and leaves negative numbers alone', () => {
	expect(csvCell('=1+1')).toBe("'=1+1");
	expect(csvCell('@SUM(A1)')).toBe("'@SUM(A1)");
	expect(csvCell(-4.5)).toBe('-4.5');
	expect(csvCell(NaN)).toBe('');
});
