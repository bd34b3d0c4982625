import { describe, expect, it } from 'vitest';
import type { StartSheet } from '$lib/model/wire/start-sheet';
import { titleCells } from './title-cells';

const data = {
	start: { circuit: '2', methodVersion: '1' },
	unit: { tag: 'X-1' },
	site: { name: 'Invented', timeZone: 'UTC' }
} as StartSheet;

describe('titleCells', () => {
	it('leaves out what is not known, and says in which units the sheet speaks', () => {
		const cells = titleCells(data, 'si', Date.UTC(2031, 0, 2, 3, 4));
		expect(cells.map(({ label }) => label)).toEqual(['Unit', 'Site', 'Sheet', 'Units of measure', 'Method', 'Printed']);
		expect(cells[0]?.value).toBe('X-1, circuit 2');
		expect(cells.at(-1)?.value).toBe('2031-01-02 03:04 UTC');
	});
	it('gives period and coverage where the server does', () => {
		const full = { ...data, coverage: 0.5, period: { from: '2031-01-01T00:00:00Z', to: '2031-02-01T00:00:00Z' } };
		expect(titleCells(full, 'ip').find(({ label }) => label === 'Period of log')?.value).toBe('2031-01-01 to 02-01');
	});
});
