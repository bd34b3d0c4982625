import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { clockMinute, clockTicks, clockX, evenClock, wideClock } from './day-clock';

describe('evenClock', () => {
	it('lays noon in the middle of a day', () => {
		expect(clockX(evenClock(480), 720)).toBe(240);
	});
	it('keeps the 25th hour on the paper', () => {
		expect(clockX(evenClock(500, 1500), 1500)).toBe(500);
	});
	it('refuses empty paper', () => {
		expect(() => evenClock(0)).toThrow(RangeError);
	});
});

describe('wideClock', () => {
	const clock = wideClock(1008, { from: 300, to: 360 });
	it('gives the span half of what the two hairlines leave', () => {
		// worked by hand: (1008 − 8) / 2 = 500 px for the hour
		expect(clock.wideRight - clock.wideLeft).toBe(500);
		expect(clockX(clock, 330)).toBe(clock.wideLeft + 250);
		expect(clockX(clock, 1440)).toBe(1008);
	});
	it('reads every pixel back', () => {
		fc.assert(
			fc.property(fc.double({ min: 0, max: 1440, noNaN: true }), (minute) => {
				expect(clockMinute(clock, clockX(clock, minute))).toBeCloseTo(minute, 6);
			})
		);
	});
	it('leaves out what lies before when it begins with the span', () => {
		const phone = wideClock(304, { from: 360, to: 420 }, 1440, 360);
		expect(phone.wideLeft).toBe(0);
		expect(phone.wideRight).toBe(150);
	});
	it('refuses a span outside the day', () => {
		expect(() => wideClock(500, { from: 1430, to: 1490 })).toThrow(RangeError);
	});
});

describe('clockTicks', () => {
	it('labels every second hour on wide even paper', () => {
		const labels = clockTicks(evenClock(900))
			.map((tick) => tick.label)
			.filter(Boolean);
		expect(labels).toEqual(['00', '02', '04', '06', '08', '10', '12', '14', '16', '18', '20', '22', '24']);
	});
	it('labels quarters inside the span and keeps others clear of it', () => {
		const labels = clockTicks(wideClock(1008, { from: 300, to: 360 }))
			.map((tick) => tick.label)
			.filter(Boolean);
		expect(labels).toEqual(['00', '03', '05:00', '05:15', '05:30', '05:45', '09', '12', '15', '18', '21', '24']);
	});
});
