import type { StartRow } from '$lib/server/repositories/starts';
import { describe, expect, it } from 'vitest';
import { coverageOf, dayStrips, joinCovered } from './day-strips';

const row = (startedAt: string, endedAt: string | null): StartRow =>
	({
		id: startedAt,
		circuit: '1',
		startedAt: Date.parse(startedAt),
		endedAt: endedAt === null ? null : Date.parse(endedAt),
		outcome: 'held',
		record: { startupTrip: false, attended: false }
	}) as unknown as StartRow;

describe('dayStrips', () => {
	it('splits a run over midnight of the site (Berlin, UTC+1: worked by hand)', () => {
		const days = dayStrips(
			[row('2026-01-05T22:00:00Z', '2026-01-06T01:30:00Z')],
			[],
			'2026-01-05',
			'2026-01-06',
			'Europe/Berlin',
			0
		);
		expect(days[0]?.strokes[0]).toMatchObject({ from: 23 * 60, to: 1440, beganBefore: false, goesOn: true });
		expect(days[1]?.strokes[0]).toMatchObject({ from: 0, to: 150, beganBefore: true, goesOn: false });
	});
	it('gives the day of the autumn change 25 hours (New York, 2024-11-03)', () => {
		const [day] = dayStrips(
			[row('2024-11-03T04:00:00Z', '2024-11-04T04:59:00Z')],
			[],
			'2024-11-03',
			'2024-11-03',
			'America/New_York',
			0
		);
		expect(day?.strokes[0]).toMatchObject({ from: 0, to: 25 * 60 - 1 });
	});
	it('ends a run that still goes on at the log’s end', () => {
		const [day] = dayStrips(
			[row('2026-01-05T08:00:00Z', null)],
			[],
			'2026-01-05',
			'2026-01-05',
			'UTC',
			Date.parse('2026-01-05T09:00:00Z')
		);
		expect(day?.strokes[0]?.to).toBe(540);
	});
});

it('counts coverage over joined stretches once', () => {
	const joined = joinCovered([
		[[0, 50]],
		[
			[40, 60],
			[80, 90]
		]
	]);
	expect(joined).toEqual([
		[0, 60],
		[80, 90]
	]);
	expect(coverageOf(joined, 0, 100)).toBeCloseTo(0.7);
});
