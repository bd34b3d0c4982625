import { expect, it } from 'vitest';
import { clockWords, siteClock } from './site-clock';

it('knows summer time (tz: New York sprang forward at 07:00Z on 2024-03-10)', () => {
	expect(siteClock(Date.parse('2024-03-10T06:59:00Z'), 'America/New_York')).toEqual({
		date: '2024-03-10',
		minutes: 119,
		weekday: 0
	});
	expect(siteClock(Date.parse('2024-03-10T07:00:30Z'), 'America/New_York').minutes).toBe(180.5);
});

it('knows a half-hour shift (tz: Lord Howe, +10:30 to +11:00 on 2024-10-05 15:30Z)', () => {
	expect(siteClock(Date.parse('2024-10-05T15:29:00Z'), 'Australia/Lord_Howe').minutes).toBe(119);
	expect(siteClock(Date.parse('2024-10-05T15:30:00Z'), 'Australia/Lord_Howe').minutes).toBe(150);
});

it('writes a clock', () => {
	expect(clockWords(347)).toBe('05:47');
	expect(clockWords(-30)).toBe('23:30');
	expect(() => siteClock(0, 'No/Where')).toThrow(RangeError);
});
