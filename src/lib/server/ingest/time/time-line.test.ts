import { describe, expect, it } from 'vitest';
import { TimeLine } from './time-line';
import { ZoneClock } from './zone';

const NOW = Date.UTC(2026, 0, 1);
const wall = (text: string) => Date.parse(`${text}:00Z`);
const utc = (ms: number) => (Number.isNaN(ms) ? null : new Date(ms).toISOString().slice(5, 16));
const line = (zone: string, descending = false) => new TimeLine(new ZoneClock(zone), NOW, descending);

describe('TimeLine', () => {
	// New York fell back on 2024-11-03 at 06:00Z (tz database).
	it('settles the repeated hour by order', () => {
		const t = line('America/New_York');
		const walls = ['00:30', '01:00', '01:30', '01:00', '01:30', '02:00'];
		expect(walls.map((w) => utc(t.next(wall(`2024-11-03T${w}`), NaN)))).toEqual([
			'11-03T04:30',
			'11-03T05:00',
			'11-03T05:30',
			'11-03T06:00',
			'11-03T06:30',
			'11-03T07:00'
		]);
		expect(t.repeated).toBe(4);
		expect(t.unsettled).toBe(0);
	});
	it('settles it backwards in a log with the newest row first', () => {
		const t = line('America/New_York', true);
		const walls = ['02:00', '01:30', '01:00', '01:30', '01:00', '00:30'];
		expect(walls.map((w) => utc(t.next(wall(`2024-11-03T${w}`), NaN)))).toEqual([
			'11-03T07:00',
			'11-03T06:30',
			'11-03T06:00',
			'11-03T05:30',
			'11-03T05:00',
			'11-03T04:30'
		]);
	});
	it('keeps rows of one instant together', () => {
		const t = line('America/New_York');
		const walls = ['01:30', '01:30', '01:00', '01:00'];
		const got = walls.map((w) => utc(t.next(wall(`2024-11-03T${w}`), NaN)));
		expect(got).toEqual(['11-03T05:30', '11-03T05:30', '11-03T06:00', '11-03T06:00']);
		expect(t.unsettled).toBe(1);
	});
	it('has no instant in the missing hour', () => {
		const t = line('America/New_York');
		expect(t.next(wall('2024-03-10T02:30'), NaN)).toBeNaN();
		expect(t.fate).toBe('missing');
	});
	it('does not believe 1970 nor the year after next', () => {
		const t = line('Europe/London');
		expect(t.next(wall('1970-01-01T00:10'), NaN)).toBeNaN();
		expect(t.fate).toBe('impossible');
		expect(t.next(wall('2027-06-01T00:10'), NaN)).toBeNaN();
	});
	it('takes the offset a stamp carries', () => {
		expect(utc(line('America/New_York').next(wall('2024-11-03T01:30'), -240))).toBe('11-03T05:30');
	});

	it('takes a log that lies in the future as a whole, and a jump ahead in mid-log for a lost clock', () => {
		const ahead = line('UTC');
		expect(utc(ahead.next(wall('2027-05-01T06:00'), NaN))).toBe('05-01T06:00');
		expect(utc(ahead.next(wall('2027-05-01T06:05'), NaN))).toBe('05-01T06:05');
		const jumping = line('UTC');
		expect(utc(jumping.next(wall('2025-05-01T06:00'), NaN))).toBe('05-01T06:00');
		expect(utc(jumping.next(wall('2027-05-01T06:05'), NaN))).toBeNull();
	});
});
