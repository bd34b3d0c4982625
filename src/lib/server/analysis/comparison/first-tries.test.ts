import { expect, it } from 'vitest';
import { DAY, MINUTE, MONDAY, startRecord, trippedRecord } from '../../../../../fixtures/inference/start-record';
import { firstTries, tally } from './first-tries';

it('counts first tries and says why the others do not count (invented starts)', () => {
	const starts = [
		trippedRecord(MONDAY),
		trippedRecord(MONDAY + 10 * MINUTE, { tryNumber: 2 }),
		startRecord(MONDAY + DAY),
		startRecord(MONDAY + 2 * DAY, { attended: true }),
		startRecord(MONDAY + 3 * DAY, { outcome: 'lost' }),
		startRecord(MONDAY + 4 * DAY, { outcome: 'called-off', endedAt: MONDAY + 4 * DAY + 60_000 }),
		startRecord(MONDAY + 5 * DAY, { outcome: 'called-off', endedAt: MONDAY + 5 * DAY + 200_000 }),
		startRecord(MONDAY + 6 * DAY, { layUp: true })
	];
	const { counted, excluded } = firstTries(starts);
	// The trip ran 80 s: the call-off at 200 s outlived it and is clean, the one at 60 s cannot be told.
	expect(tally(counted)).toEqual({ k: 1, m: 3 });
	expect(excluded.map((one) => one.start.startedAt)).toEqual([1, 3, 4, 5, 7].map((i) => starts[i]?.startedAt));
	expect(excluded[0]?.reason).toContain('try 2');
});

it('takes no call-off for clean while no trip says how long one takes', () => {
	const { counted } = firstTries([startRecord(MONDAY, { outcome: 'called-off' })]);
	expect(counted).toHaveLength(0);
});
