import { describe, expect, it } from 'vitest';
import type { UnitSummary } from '$lib/model/wire/views';
import { filterUnits, rowInARow, unitsCsv, type UnitFilter } from './filter-units';

// Invented units.
function row(tag: string, site: string, over: Partial<UnitSummary> = {}): UnitSummary {
	return {
		unit: { id: tag, siteId: site, tag, refrigerant: 'R-134a', circuits: 1, nature: {}, limits: {} },
		site: { id: site, name: `Site ${site}`, timeZone: 'UTC', address: null, altitude: null },
		starts: 10,
		startupTrips: 0,
		firstTries: { m: 6, k: 0, low: 0, high: 0.39 },
		lastFirst: [],
		trippedInARow: 0,
		verdict: null,
		leading: null,
		withheld: false,
		coverage: 0.9,
		strip: [],
		openCase: null,
		nextVisit: null,
		logs: { ready: 1, waiting: 0, refused: 0, reading: 0 },
		...over
	};
}
const all: UnitFilter = { text: '', site: '', only: 'all', sort: 'worst' };
const rows = [
	row('KM-10', 'b', { startupTrips: 3, coverage: 0.5 }),
	row('KM-2', 'b', { verdict: 'cannot-tell', coverage: null }),
	row('AL-1', 'a', { startupTrips: 5 })
];
const tags = (filter: Partial<UnitFilter>) => filterUnits(rows, { ...all, ...filter }).map((r) => r.unit.tag);

describe('filterUnits', () => {
	it('keeps the order it was sent in', () => expect(tags({})).toEqual(['KM-10', 'KM-2', 'AL-1']));
	it('sorts tags as people count', () => expect(tags({ sort: 'tag' })).toEqual(['AL-1', 'KM-2', 'KM-10']));
	it('puts a unit without any log first by coverage', () =>
		expect(tags({ sort: 'coverage' })).toEqual(['KM-2', 'KM-10', 'AL-1']));
	it('filters by site, words and state', () => {
		expect(tags({ site: 'a' })).toEqual(['AL-1']);
		expect(tags({ text: 'km site' })).toEqual(['KM-10', 'KM-2']);
		expect(tags({ only: 'tripping', sort: 'trips' })).toEqual(['AL-1', 'KM-10']);
		expect(tags({ only: 'cannot-tell' })).toEqual(['KM-2']);
	});
});

describe('rowInARow', () => {
	it('says how the last ones went', () => {
		const words = (lastFirst: UnitSummary['lastFirst'], trippedInARow = 0) =>
			rowInARow(row('x', 'a', { lastFirst, trippedInARow })).text;
		expect(words(['held', 'tripped', 'tripped'], 2)).toBe('2 tripped in a row');
		expect(words(['held', 'tripped'], 1)).toBe('the last one tripped');
		expect(words(['tripped', 'held', 'held'])).toBe('none in the last 2');
		expect(words(['tripped', 'held'])).toBe('none since the last');
		expect(words(['held', 'held'])).toBe('none tripped');
		expect(words([])).toBe('no first start logged');
	});
});

describe('unitsCsv', () => {
	it('keeps a withheld suspect out of the file', () => {
		const leading = { key: 'low-oil', name: 'Low oil', standing: 'fits' };
		expect(unitsCsv([row('x', 'a', { leading, withheld: true })])).not.toContain('Low oil');
		expect(unitsCsv([row('x', 'a', { leading })])).toContain('Low oil,fits');
	});
});
