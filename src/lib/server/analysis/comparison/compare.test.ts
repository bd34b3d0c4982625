import { expect, it } from 'vitest';
import { DAY, MINUTE, MONDAY, startRecord, trippedRecord } from '../../../../../fixtures/inference/start-record';
import { inventedWeek } from '../suspects/testing/invented-week';
import { compareGroups, presetsFor, type ComparisonInput } from './compare';

// Two invented weeks: mornings trip with a loaded slide, afternoons hold.
const starts = Array.from({ length: 14 }, (_, day) => [
	trippedRecord(MONDAY + day * DAY + 360 * MINUTE, { figures: { startCapacity: 72 + (day % 4), waterOutAtStart: 14 } }),
	startRecord(MONDAY + day * DAY + 840 * MINUTE, {
		firstStart: false,
		restSeconds: 7200,
		figures: { startCapacity: 44 + (day % 5), waterOutAtStart: 14 }
	})
]).flat();
const input = (a: string, b: string, more: Partial<ComparisonInput> = {}): ComparisonInput => ({
	starts,
	a,
	b,
	timeZone: 'UTC',
	changes: [],
	covered: [{ from: MONDAY, to: MONDAY + 7 * DAY }],
	period: { from: MONDAY, to: MONDAY + 14 * DAY },
	input: null,
	...more
});

it('says what differs, how surprising it is, and what the log covers', () => {
	const result = compareGroups(input('clock<11:00', 'clock>=12:00'));
	expect(result.a.firstTries).toMatchObject({ k: 14, m: 14 });
	expect(result.b.firstTries).toMatchObject({ k: 0, m: 14 });
	expect(result.split?.method).toBe('sign-flip by day');
	expect(result.chance).toContain('1 time in 8,200');
	expect(result.sentences.some((one) => one.startsWith('Capacity at start was always higher'))).toBe(true);
	expect(result.coverageSentence).toBe('In the logs you gave: 7 of 14 mornings covered.');
	expect(result.crossTable?.note).toContain('cannot be told apart');
	expect(result.tooFew).toBeNull();
});

it('shows and does not test too few starts', () => {
	const result = compareGroups(input('clock<11:00&to:2025-06-02', 'clock>=12:00&to:2025-06-03'));
	expect(result.tooFew).toContain('Too few starts');
	expect(result.differences.every((row) => !row.clear)).toBe(true);
});

it('leaves starts of both groups out of both, and has an answer for an empty group', () => {
	const result = compareGroups(input('all', 'clock<11:00'));
	expect(result.b.starts).toHaveLength(0);
	expect(result.tooFew).toContain('no start');
	expect(result.sentences.at(-1)).toContain('14 starts in both groups');
});

it('does not test rates of groups that are divided by outcome', () => {
	const result = compareGroups(input('outcome:tripped', 'outcome:held'));
	expect(result.chance).toBeNull();
	expect(result.split).toBeNull();
});

it('offers before and after the last change', () => {
	const change = { id: 'c7', at: MONDAY, text: 'x', aimedAt: [], newHistory: false };
	expect(presetsFor([change]).at(-1)).toMatchObject({ a: 'before:c7', b: 'after:c7' });
	expect(presetsFor([])).toHaveLength(3);
});

it('lays traces over each other where the series are at hand (invented week)', () => {
	const week = inventedWeek(
		{ tripAfter: (_, morning) => (morning ? 80 : null), startCapacity: 80, stopCapacity: 78 },
		{ spacing: 15 }
	);
	const result = compareGroups({
		...input('outcome:tripped', 'outcome:held&try=1'),
		starts: week.starts,
		input: week.input
	});
	const capacity = result.envelopes.find((one) => one.signal === 'capacity');
	// Tripped starts are gone after 80 s; the held ones stay whole for the 20 min shown.
	expect(capacity?.a.wholeUntil).toBeLessThanOrEqual(90);
	expect(capacity?.b.wholeUntil).toBeNull();
	expect(capacity?.a.median[2]).toBeCloseTo(80, 0);
	expect(result.landmarks.map((one) => [one.seconds, one.countA > 0])).toEqual([
		[30, true],
		[45, true],
		[60, true],
		[90, false],
		[120, false]
	]);
	expect(result.landmarks[0]?.rows.find((row) => row.signal === 'evapSaturation')?.described).toBe(true);
	expect(result.landmarks[0]?.rows.some((row) => row.signal === 'evapWaterOut')).toBe(false);
	expect(result.horizonSeconds).toBeLessThanOrEqual(90);
});
