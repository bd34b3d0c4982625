import type { Interval } from '$lib/model/series';
import type { StartRecord } from '$lib/model/start';
import { firstTries } from '../comparison/first-tries';
import { beThereBy, type WeekdayKind } from './be-there-by';
import { type NextStartChance, nextStartChances } from './next-start';

const DAY = 86_400_000;
const AHEAD_DAYS = 14;

export type RepeaterInput = {
	unit: string;
	timeZone: string;
	starts: readonly StartRecord[];
	/** Last change, ms UTC; what was before it does not count. */
	lastChangeAt: number | null;
	/** Stretches with a log. */
	covered: readonly Interval[];
};

export type Repeater = {
	unit: string;
	chance: NextStartChance;
	/** First starts to be expected in the next 14 days. */
	expectedFirstStarts: number;
	/** 10th percentile × expected first starts: trips that are as good as sure. */
	score: number;
	/** Start-up trips in a row among the latest first tries. */
	inARow: number;
	/** Share of the last 28 days with a log, 0…1. */
	coverage: number;
	beThereBy: Record<WeekdayKind, { minutes: number; firstStarts: number } | null>;
};

function coveredDays(covered: readonly Interval[], from: number, to: number): number {
	return covered.reduce((sum, one) => sum + Math.max(0, Math.min(one.to, to) - Math.max(one.from, from)), 0) / DAY;
}

/**
 * The manager's list: units by the 10th percentile of their next-start chance times the first starts expected in 14
 * days, so that a single trip does not outrank a long record. Units without a counted first try or without a trip are left out.
 */
export function repeaters(units: readonly RepeaterInput[], now: number): Repeater[] {
	const counted = units.map((unit) => {
		const since = unit.starts.filter(
			(start) => start.startedAt <= now && (unit.lastChangeAt === null || start.startedAt >= unit.lastChangeAt)
		);
		return { unit, tries: firstTries(since).counted };
	});
	const chances = nextStartChances(
		counted.map(({ unit, tries }) => ({
			unit: unit.unit,
			tries: tries.map(({ start, tripped }) => ({ at: start.startedAt, tripped, kind: start.trip?.kind ?? null }))
		})),
		now
	);
	const list = counted.flatMap(({ unit, tries }) => {
		const chance = chances.get(unit.unit);
		if (!chance || chance.trips === 0) return [];
		const from = now - 28 * DAY;
		const days = coveredDays(unit.covered, from, now);
		const firsts = unit.starts.filter((start) => start.firstStart && start.startedAt >= from && start.startedAt <= now);
		const expectedFirstStarts = days > 0 ? Math.min(AHEAD_DAYS * 2, (firsts.length / days) * AHEAD_DAYS) : 0;
		const clean = [...tries].reverse().findIndex((one) => !one.tripped);
		return [
			{
				unit: unit.unit,
				chance,
				expectedFirstStarts,
				score: chance.tenth * expectedFirstStarts,
				inARow: clean === -1 ? tries.length : clean,
				coverage: days / 28,
				beThereBy: beThereBy(unit.starts, unit.timeZone, now)
			}
		];
	});
	return list.sort((a, b) => b.score - a.score || b.chance.tenth - a.chance.tenth || (a.unit < b.unit ? -1 : 1));
}
