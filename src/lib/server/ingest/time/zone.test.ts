import { describe, expect, it } from 'vitest';
import { fixedOffset, isZone, ZoneClock } from './zone';

const wall = (text: string) => Date.parse(`${text}Z`);
const iso = (ms: number) => new Date(ms).toISOString();

describe('ZoneClock', () => {
	// The tz database's transitions, as listed in sources.md.
	it('has no 02:30 in New York on 2024-03-10', () => {
		expect(new ZoneClock('America/New_York').instants(wall('2024-03-10T02:30:00')).missing).toBe(true);
	});
	it('has two 01:30 in New York on 2024-11-03', () => {
		const r = new ZoneClock('America/New_York').instants(wall('2024-11-03T01:30:00'));
		expect([iso(r.first), iso(r.second)]).toEqual(['2024-11-03T05:30:00.000Z', '2024-11-03T06:30:00.000Z']);
	});
	it('has two 01:30 in London on 2024-10-27', () => {
		const r = new ZoneClock('Europe/London').instants(wall('2024-10-27T01:30:00'));
		expect([iso(r.first), iso(r.second)]).toEqual(['2024-10-27T00:30:00.000Z', '2024-10-27T01:30:00.000Z']);
	});
	it('has two 02:30 in Berlin on 2024-10-27', () => {
		const r = new ZoneClock('Europe/Berlin').instants(wall('2024-10-27T02:30:00'));
		expect([iso(r.first), iso(r.second)]).toEqual(['2024-10-27T00:30:00.000Z', '2024-10-27T01:30:00.000Z']);
	});
	it('shifts by half an hour on Lord Howe', () => {
		const clock = new ZoneClock('Australia/Lord_Howe');
		// 2024-10-06 02:00 becomes 02:30; 2024-04-07 02:00 becomes 01:30.
		expect(clock.instants(wall('2024-10-06T02:15:00')).missing).toBe(true);
		expect(clock.instants(wall('2024-10-06T02:30:00')).missing).toBe(false);
		const r = clock.instants(wall('2024-04-07T01:45:00'));
		expect(r.second - r.first).toBe(30 * 60_000);
	});
	it('never changes in Phoenix', () => {
		const clock = new ZoneClock('America/Phoenix');
		for (let day = 0; day < 366; day++) {
			const r = clock.instants(wall('2024-01-01T02:30:00') + day * 86_400_000);
			expect(r.missing || !Number.isNaN(r.second)).toBe(false);
			expect(clock.offsetAt(r.first)).toBe(-7 * 3_600_000);
		}
	});
	it('goes there and back for every quarter of an hour of a year', () => {
		for (const zone of ['America/New_York', 'Europe/Berlin', 'Australia/Lord_Howe', 'Asia/Kathmandu']) {
			const clock = new ZoneClock(zone);
			const lost: number[] = [];
			for (let utc = Date.UTC(2024, 0, 1); utc < Date.UTC(2025, 0, 1); utc += 900_000) {
				const r = clock.instants(utc + clock.offsetAt(utc));
				if (r.first !== utc && r.second !== utc) lost.push(utc);
			}
			expect(lost).toEqual([]);
		}
	});
});

describe('zone names', () => {
	it('reads fixed offsets', () => {
		expect(fixedOffset('+05:30')).toBe(330);
		expect(fixedOffset('UTC-5')).toBe(-300);
		expect(fixedOffset('utc')).toBe(0);
		expect(fixedOffset('America/New_York')).toBeNull();
		expect(fixedOffset('+25:00')).toBeNull();
	});
	it('knows a zone from a word', () => {
		expect(isZone('Europe/London')).toBe(true);
		expect(isZone('Plant/Room')).toBe(false);
	});
});
