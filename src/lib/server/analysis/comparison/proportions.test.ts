import { expect, it } from 'vitest';
import { DAY, MINUTE, MONDAY, startRecord, trippedRecord } from '../../../../../fixtures/inference/start-record';
import { firstTries } from './first-tries';
import { shareOf, splitTest } from './proportions';

const tries = (outcomes: string, clock: number, step = 1) =>
	firstTries(
		[...outcomes].map((mark, i) =>
			(mark === 't' ? trippedRecord : startRecord)(MONDAY + i * step * DAY + clock * MINUTE)
		)
	).counted;

it('takes day by day when six days hold both kinds (by hand: six of six days one way are 2 of 64)', () => {
	expect(splitTest(tries('tttttt', 360), tries('cccccc', 840), 'UTC')).toEqual({
		chance: 2 / 64,
		method: 'sign-flip by day'
	});
});

it("takes Fisher's test for lone starts whose days are not alike", () => {
	const a = tries('tctc', 360, 4);
	const b = tries('cccc', 360, 4).map((one) => ({
		...one,
		start: { ...one.start, startedAt: one.start.startedAt + 2 * DAY }
	}));
	const result = splitTest(a, b, 'UTC');
	expect(result?.method).toBe('Fisher');
	// [[2, 2], [0, 4]]: 30 of 70 tables are as uneven (by hand).
	expect(result?.chance).toBeCloseTo(30 / 70, 9);
});

it('keeps days together when they hold several first tries', () => {
	const a = [...tries('tt', 360), ...tries('tt', 400)];
	expect(splitTest(a, tries('cc', 840, 3), 'UTC')?.method).toBe('whole days shuffled');
});

it('cannot compare with nothing, and widens the interval for days that are alike', () => {
	expect(splitTest([], tries('c', 0), 'UTC')).toBeNull();
	const alike = shareOf(tries('tttttttttccccccccc', 360), 'UTC');
	const mixed = shareOf(tries('tctctctctctctctctc', 360), 'UTC');
	expect(alike.k).toBe(mixed.k);
	expect((alike.high ?? 0) - (alike.low ?? 0)).toBeGreaterThan((mixed.high ?? 0) - (mixed.low ?? 0));
	expect(shareOf([], 'UTC')).toMatchObject({ k: 0, m: 0, low: null });
});
