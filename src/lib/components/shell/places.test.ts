import { describe, expect, it } from 'vitest';
import { currentPlace, currentSheet, placesFor, roleName, sheetHref, withQuery } from './places';

describe('places', () => {
	it('shows the office to those who run it', () => {
		expect(placesFor('owner').map((p) => p.label)).toContain('Office');
		expect(placesFor('technician').map((p) => p.label)).not.toContain('Office');
	});
	it('knows where an address belongs', () => {
		expect(currentPlace('/')).toBe('/');
		expect(currentPlace('/units/a/starts/b')).toBe('/');
		expect(currentPlace('/cases/7')).toBe('/cases');
		expect(currentPlace('/casesandmore')).toBe('');
	});
	it('puts a start sheet under Starts, and the bare unit under Days', () => {
		expect(currentSheet('/units/u1', 'u1')).toBe('');
		expect(currentSheet('/units/u1/starts/s1', 'u1')).toBe('/starts');
		expect(currentSheet('/units/u1/side-by-side', 'u1')).toBe('/side-by-side');
	});
	it('keeps the circuit in the address', () => {
		expect(sheetHref('u1', '/nights', '2')).toBe('/units/u1/nights?circuit=2');
		expect(sheetHref('u1', '', null)).toBe('/units/u1');
	});
	it('sets and takes away one field of an address', () => {
		const url = new URL('http://x/units/u1?from=2026-01-01&circuit=1');
		expect(withQuery(url, 'circuit', '2')).toBe('/units/u1?from=2026-01-01&circuit=2');
		expect(withQuery(new URL('http://x/?site=s'), 'site', null)).toBe('/');
	});
	it('says a role in words', () => {
		expect(roleName('engineer')).toBe('service engineer');
		expect(roleName('guest')).toBe('guest');
	});
});
