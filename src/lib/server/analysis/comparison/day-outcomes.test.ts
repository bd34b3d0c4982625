import { expect, it } from 'vitest';
import { DAY, MONDAY, startRecord, trippedRecord } from '../../../../../fixtures/inference/start-record';
import { dependenceOf, outcomesByDay } from './day-outcomes';
import { firstTries } from './first-tries';

it('gives one share a day and no reading for a day without a start (by hand)', () => {
	const { counted } = firstTries([trippedRecord(MONDAY), startRecord(MONDAY + DAY / 2), startRecord(MONDAY + 2 * DAY)]);
	expect(outcomesByDay(counted, 'UTC')).toEqual([0.5, NaN, 0]);
	expect(outcomesByDay([], 'UTC')).toEqual([]);
});

it('counts runs of bad days as fewer than they look', () => {
	const tries = Array.from({ length: 20 }, (_, i) => (i < 10 ? trippedRecord : startRecord)(MONDAY + i * DAY));
	expect(dependenceOf(firstTries(tries).counted, 'UTC').d).toBeGreaterThan(2);
});
