import { expect, it } from 'vitest';
import { DAY, MINUTE, MONDAY, startRecord } from '../../../../../fixtures/inference/start-record';
import { beThereBy, weekdayKind } from './be-there-by';

it('is early among the clocks of that kind of day, less 20 min (by hand)', () => {
	// Five working days at 06:00 and one attended at 04:00 that must not count.
	const starts = Array.from({ length: 5 }, (_, i) => startRecord(MONDAY + i * DAY + 360 * MINUTE));
	const times = beThereBy([...starts, startRecord(MONDAY + 240 * MINUTE, { attended: true })], 'UTC', MONDAY + 7 * DAY);
	expect(times['working-day']).toEqual({ minutes: 340, firstStarts: 5 });
	expect(times.weekend).toBeNull();
	expect(weekdayKind(6)).toBe('weekend');
});
