import { expect, it } from 'vitest';
import { DAY, MONDAY, startRecord, trippedRecord } from '../../../../../fixtures/inference/start-record';
import type { TripKind } from '$lib/model/start';
import { inventedInput } from '../testing/synthetic-log';
import { eligibleStarts, isTellingTrip, presentStarts, speaksAbout } from './evidence';

const starts = Array.from({ length: 6 }, (_, day) => startRecord(MONDAY + day * DAY));
const change = (day: number, newHistory = false) => ({
	id: `c${day}`,
	at: MONDAY + day * DAY - 1000,
	text: 'x',
	aimedAt: [],
	newHistory
});
const present = (...changes: ReturnType<typeof change>[]) =>
	presentStarts({ input: inventedInput({}), starts, changes }).length;

it('takes the starts since the last change once three are there (by hand)', () => {
	expect(present()).toBe(6);
	expect(present(change(3))).toBe(3);
	expect(present(change(4))).toBe(6);
});

it('never takes another machine’s history', () => {
	expect(present(change(4, true))).toBe(2);
});

it('leaves out attended starts, lay-ups and lost ones, and stops from outside', () => {
	expect(
		eligibleStarts([
			startRecord(MONDAY, { attended: true }),
			startRecord(MONDAY, { layUp: true }),
			startRecord(MONDAY, { outcome: 'lost' })
		])
	).toEqual([]);
	expect(isTellingTrip(trippedRecord(MONDAY, {}, 'emergency-stop'))).toBe(false);
	const speaks = (kind: TripKind, side: 'low-side' | 'head') => speaksAbout(trippedRecord(MONDAY, {}, kind), side);
	expect(speaks('loss-of-water-flow', 'low-side')).toBe(false);
	expect(speaks('unknown', 'low-side')).toBe(true);
	expect([speaks('oil-flow', 'low-side'), speaks('oil-flow', 'head')]).toEqual([false, true]);
});
