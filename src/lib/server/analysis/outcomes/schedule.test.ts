import { describe, expect, it } from 'vitest';
import { onSchedule, siteClock } from './schedule';

const DAY = 86_400_000;
const MONDAY = Date.UTC(2025, 5, 2);
const stop = (day: number, hours: number, long = true) => ({ at: MONDAY + day * DAY + hours * 3_600_000, long });

describe('siteClock', () => {
	it('reads the site’s day and minute, summer time included', () => {
		// 2 June 2025, 03:30 UTC is 23:30 the day before in New York (UTC−4), 05:30 in Berlin (UTC+2).
		expect(siteClock('America/New_York')(MONDAY + 3.5 * 3_600_000)).toEqual({ day: '2025-06-01', minute: 1410 });
		expect(siteClock('Europe/Berlin')(MONDAY + 3.5 * 3_600_000)).toEqual({ day: '2025-06-02', minute: 330 });
		expect(() => siteClock('Nowhere/Land')).toThrow(RangeError);
	});
});

describe('onSchedule', () => {
	const clock = siteClock('UTC');

	it('knows a stop at the same time on three days or more', () => {
		const stops = [stop(0, 18), stop(1, 18.01), stop(2, 17.99), stop(3, 18), stop(3, 14.2)];
		expect(onSchedule(stops, clock)).toEqual([true, true, true, true, false]);
		expect(onSchedule(stops.slice(0, 2), clock)).toEqual([false, false]);
	});

	it('makes no schedule of short runs: a start that trips at the same time every morning is none', () => {
		expect(
			onSchedule(
				[0, 1, 2, 3].map((day) => stop(day, 6.02, false)),
				clock
			)
		).toEqual([false, false, false, false]);
	});
});
