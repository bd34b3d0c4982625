import { describe, expect, it } from 'vitest';
import type { DateOrder } from '../types';
import { readClock, StampReader } from './stamp';

function read(text: string, order: DateOrder, year: number | null = null) {
	const reader = new StampReader(order, year);
	if (!reader.readText(text)) return null;
	const { wall, offset } = reader.out;
	return new Date(wall).toISOString().replace('.000Z', '') + (Number.isNaN(offset) ? '' : ` ${offset}`);
}

describe('StampReader', () => {
	// Hand-worked: each text says its own instant.
	const cases: [string, DateOrder, string | null][] = [
		['2025-03-05 13:00:05', 'ymd', '2025-03-05T13:00:05'],
		['2025-03-05T13:00', 'ymd', '2025-03-05T13:00:00'],
		['2025/3/5 1:02:03', 'ymd', '2025-03-05T01:02:03'],
		['2025-03-05T13:00:05.250', 'ymd', '2025-03-05T13:00:05.250Z'],
		['2025-03-05T13:00:05Z', 'ymd', '2025-03-05T13:00:05 0'],
		['2025-03-05T13:00:05-05:00 New_York', 'ymd', '2025-03-05T13:00:05 -300'],
		['2025-03-05T13:00:05+0530', 'ymd', '2025-03-05T13:00:05 330'],
		['2025-03-05T13:00:05Z London', 'ymd', '2025-03-05T13:00:05 0'],
		['20250305130005', 'ymd', '2025-03-05T13:00:05'],
		['20250305T130005Z', 'ymd', '2025-03-05T13:00:05 0'],
		['20250305 1300', 'ymd', '2025-03-05T13:00:00'],
		['03/05/2025 1:00:05 PM', 'mdy', '2025-03-05T13:00:05'],
		['3/5/25 12:00 AM', 'mdy', '2025-03-05T00:00:00'],
		['3/5/2025 12:30:00 p.m. EST', 'mdy', '2025-03-05T12:30:00 -300'],
		['3/5/2025, 1:00:00\u202fPM', 'mdy', '2025-03-05T13:00:00'],
		['05.03.2025 24:00:00', 'dmy', '2025-03-06T00:00:00'],
		['05/03/2025 13:00', 'dmy', '2025-03-05T13:00:00'],
		['05.03.2025 13.00.05', 'dmy', '2025-03-05T13:00:05'],
		['05-Mar-2025 13:00:05', 'dmy', '2025-03-05T13:00:05'],
		['Mar 5, 2025 1:00:05 PM', 'mdy', '2025-03-05T13:00:05'],
		['Wed Mar 05 13:00:05 EST 2025', 'mdy', '2025-03-05T13:00:05 -300'],
		['Wed, 5 March 2025 13:00', 'dmy', '2025-03-05T13:00:00'],
		['1741179605', 'epoch-s', '2025-03-05T13:00:05 0'],
		['1741179605500', 'epoch-ms', '2025-03-05T13:00:05.500Z 0'],
		// Spreadsheet serial dates of the 1900 system: 61 is 1900-03-01, 25569 is 1970-01-01, 45658 is 2025-01-01.
		['61', 'serial', '1900-03-01T00:00:00'],
		['25569', 'serial', '1970-01-01T00:00:00'],
		['45658.5', 'serial', '2025-01-01T12:00:00'],
		['13/05/2025 13:00', 'mdy', null],
		['2025-02-30 13:00', 'ymd', null],
		['2025-03-05 24:01', 'ymd', null],
		['03/05/2025 13:00 PM', 'mdy', null],
		['total', 'ymd', null],
		['44.3', 'ymd', null],
		['', 'ymd', null]
	];
	it.each(cases)('%s as %s', (text, order, expected) => expect(read(text, order)).toBe(expected));
	it('gives stamps without a year the year it is told', () => {
		expect(read('03/05 24:00:00', 'md', 2025)).toBe('2025-03-06T00:00:00');
	});
	it('tells a date alone from a date with a clock', () => {
		const reader = new StampReader('ymd', null);
		expect(reader.readText('2025-03-05') && !reader.out.hasClock).toBe(true);
		expect(reader.readText('2025-03-05 00:00') && reader.out.hasClock).toBe(true);
	});
});

describe('readClock', () => {
	it('reads clocks and nothing else', () => {
		expect(readClock('1:05 PM')).toBe(13 * 3_600_000 + 5 * 60_000);
		expect(readClock('13:05:30.5')).toBe(13 * 3_600_000 + 5 * 60_000 + 30_500);
		expect(readClock('24:00')).toBe(86_400_000);
		expect(readClock('13.05')).toBeNaN();
		expect(readClock('25:00')).toBeNaN();
	});
});
