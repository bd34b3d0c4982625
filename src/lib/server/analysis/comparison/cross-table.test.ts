import { expect, it } from 'vitest';
import { DAY, MINUTE, MONDAY, startRecord, trippedRecord } from '../../../../../fixtures/inference/start-record';
import { wordsFor } from '../wording/quantity-words';
import { crossTableOf } from './cross-table';
import { firstTries } from './first-tries';

const days = [0, 1, 2, 3, 4];
const starts = days.flatMap((day) => [
	trippedRecord(MONDAY + day * DAY + 360 * MINUTE, { figures: { condWaterInAtStart: 15 + day / 10 } }),
	startRecord(MONDAY + day * DAY + 840 * MINUTE, {
		firstStart: false,
		restSeconds: 1800,
		figures: { condWaterInAtStart: 24 }
	})
]);

it('counts by clock and rest, and says when they are one thing (invented)', () => {
	const table = crossTableOf(firstTries(starts).counted, 'UTC', wordsFor('si'));
	expect(table?.cells.map(({ label, shares }) => [label, shares.map((share) => share && [share.k, share.m])])).toEqual([
		['before 11:00', [[5, 5], null]],
		['from 12:00', [null, [0, 5]]]
	]);
	expect(table?.note).toContain('cannot be told apart');
	expect(table?.note).toContain('15.2 °C against 24.0 °C');
});

it('says nothing when clock and rest cross, and has no table without a first try', () => {
	const crossed = starts.map((start, i) => ({
		...start,
		firstStart: i % 3 !== 0,
		figures: { ...start.figures, condWaterInAtStart: 20 }
	}));
	expect(crossTableOf(firstTries(crossed).counted, 'UTC', wordsFor('si'))?.note).toBeNull();
	expect(crossTableOf([], 'UTC', wordsFor('si'))).toBeNull();
});
