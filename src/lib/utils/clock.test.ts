import { describe, expect, it } from 'vitest';
import * as clock from './clock';

describe('clock and date of a site', () => {
	// tz cases: New York 2024-11-03 01:30 is 05:30Z and 06:30Z; London 2024-10-27 01:30 is 00:30Z or 01:30Z (IANA tz).
	it('reads the repeated hour alike and says which by its zone', () => {
		expect(clock.formatClock('2024-11-03T05:30:00Z', 'America/New_York')).toBe('01:30');
		expect(clock.formatClock('2024-11-03T06:30:00Z', 'America/New_York')).toBe('01:30');
		expect(clock.formatClock('2024-10-27T00:30:00Z', 'Europe/London')).toBe('01:30');
	});
	it('prints midnight as 00, seconds when asked', () => {
		expect(clock.formatClock('2025-03-02T00:00:09Z', 'UTC', { seconds: true })).toBe('00:00:09');
	});
	it('takes the date of the site, not of UTC', () => {
		expect(clock.formatDate('2026-05-12T03:00:00Z', 'America/Chicago')).toBe('Mon 11 May');
		expect(clock.isoDate('2026-05-12T03:00:00Z', 'America/Chicago')).toBe('2026-05-11');
		expect(clock.formatDateClock('2026-05-12T03:00:00Z', 'America/Chicago', { year: true })).toBe(
			'Mon 11 May 2026 22:00'
		);
	});
	it('names the zone of the printing', () => {
		expect(clock.formatPrintedAt('2025-06-01T12:05:00Z', 'UTC')).toBe('2025-06-01 12:05 UTC');
	});
	it('abbreviates zones as their own people do', () => {
		expect(clock.formatPrintedAt('2026-01-10T12:05:00Z', 'America/Phoenix')).toBe('2026-01-10 05:05 MST');
		expect(clock.formatPrintedAt('2026-01-10T12:05:00Z', 'Europe/Berlin')).toBe('2026-01-10 13:05 CET');
	});
	it('refuses what is no instant', () => {
		expect(() => clock.formatClock('yesterday', 'UTC')).toThrow(RangeError);
	});
	it('gives the minute of the site’s day', () => {
		expect(clock.minuteOfDay('2026-05-12T03:20:00Z', 'America/Chicago')).toEqual({ date: '2026-05-11', minute: 1340 });
	});
	it('splits a date that is already the site’s', () => {
		expect(clock.dayParts('2026-05-10')).toEqual({ weekday: 'Sun', day: '10', month: 'May', weekend: true });
	});
});

describe('periods, elapsed and lengths of time', () => {
	it('leaves out the second year where it is the same', () => {
		expect(clock.formatPeriod('2026-02-02', '2026-03-06')).toBe('2026-02-02 to 03-06');
		expect(clock.formatPeriod('2024-12-30T00:00:00Z', '2025-01-05')).toBe('2024-12-30 to 2025-01-05');
		expect(clock.formatPeriod('2025-01-05', '2025-01-05')).toBe('2025-01-05');
	});
	it('counts from the start in minutes and seconds', () => {
		expect(clock.formatElapsed(95)).toBe('1:35');
		expect(clock.formatElapsed(-30)).toBe('−0:30');
		expect(clock.formatElapsed(3800)).toBe('1:03:20');
		expect(clock.formatElapsed(-0.2)).toBe('0:00');
	});
	it('keeps the two largest units', () => {
		expect(clock.formatDuration(51)).toBe('51\u00a0s');
		expect(clock.formatDuration(34_800)).toBe('9\u00a0h 40\u00a0min');
		expect(clock.formatDuration(7200)).toBe('2\u00a0h');
		expect(clock.formatDuration(3 * 86_400 + 5 * 3600)).toBe('3\u00a0d 5\u00a0h');
	});
	it('prints minutes of a day, and 24:00 at its end', () => {
		expect(clock.formatMinutes(860)).toBe('14:20');
		expect(clock.formatMinutes(1440)).toBe('24:00');
	});
	it('counts whole days', () => {
		expect(clock.formatDaysSince('2025-01-01T10:00:00Z', '2025-01-02T09:00:00Z')).toBe('today');
		expect(clock.formatDaysSince('2025-01-01T10:00:00Z', '2025-01-24T11:00:00Z')).toBe('23 days');
	});
});

describe('days of a site as instants', () => {
	// IANA tz: New York is 5 h behind UTC in winter, 4 h in summer; its day of 2024-11-03 has 25 hours, of 2024-03-10 23.
	it('knows days of 23 and 25 hours', () => {
		expect(clock.dayBegins('2024-11-03', 'America/New_York')).toBe('2024-11-03T04:00:00.000Z');
		expect(clock.dayEnds('2024-11-03', 'America/New_York')).toBe('2024-11-04T05:00:00.000Z');
		expect(clock.dayBegins('2024-03-10', 'America/New_York')).toBe('2024-03-10T05:00:00.000Z');
		expect(clock.dayEnds('2024-03-10', 'America/New_York')).toBe('2024-03-11T04:00:00.000Z');
	});
	// IANA tz: Lord Howe is 10:30 ahead in winter and shifts by half an hour.
	it('knows half hours, and zones ahead of UTC', () => {
		expect(clock.dayBegins('2024-07-01', 'Australia/Lord_Howe')).toBe('2024-06-30T13:30:00.000Z');
		expect(clock.dayEnds('2026-12-31', 'UTC')).toBe('2027-01-01T00:00:00.000Z');
	});
	// IANA tz: New York is five hours behind UTC in winter; 2024-11-03 01:30 comes twice, at 05:30Z first.
	it('gives the instant of a clock of the site, the first of a repeated hour', () => {
		expect(clock.siteInstant('2025-01-06T07:15', 'America/New_York')).toBe('2025-01-06T12:15:00.000Z');
		expect(clock.siteInstant('2024-11-03T01:30', 'America/New_York')).toBe('2024-11-03T05:30:00.000Z');
		expect(clock.siteInstant('2024-11-03T03:30', 'America/New_York')).toBe('2024-11-03T08:30:00.000Z');
		expect(clock.siteInstant('', 'UTC')).toBeNull();
	});
	it('refuses what is no date', () => expect(() => clock.dayBegins('2026-13-01', 'UTC')).toThrow(RangeError));
});
