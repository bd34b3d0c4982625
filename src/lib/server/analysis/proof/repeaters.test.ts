import { expect, it } from 'vitest';
import { DAY, MONDAY, startRecord, trippedRecord } from '../../../../../fixtures/inference/start-record';
import { repeaters } from './repeaters';

const unit = (name: string, outcomes: string, lastChangeAt: number | null = null) => ({
	unit: name,
	timeZone: 'UTC',
	lastChangeAt,
	covered: [{ from: MONDAY, to: MONDAY + 28 * DAY }],
	starts: [...outcomes].map((mark, i) =>
		(mark === 't' ? trippedRecord : startRecord)(MONDAY + (28 - outcomes.length + i) * DAY)
	)
});
const now = MONDAY + 28 * DAY;

it('does not let a single trip outrank a long record', () => {
	const list = repeaters([unit('once', 't'), unit('often', 'tctctctttctctctc')], now);
	expect(list.map((one) => one.unit)).toEqual(['often', 'once']);
	expect(list[0]?.chance).toMatchObject({ trips: 9, tries: 16 });
	expect(list[0]?.coverage).toBeCloseTo(1, 12);
});

it('leaves out sound units and what was before the last change, and counts trips in a row', () => {
	const list = repeaters([unit('sound', 'cccc'), unit('repaired', 'tttt', now), unit('row', 'ctt')], now);
	expect(list.map((one) => one.unit)).toEqual(['row']);
	expect(list[0]?.inARow).toBe(2);
});
