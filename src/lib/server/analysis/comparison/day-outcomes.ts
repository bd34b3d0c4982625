import { dependence } from '../statistics/effective-counts';
import { siteClock } from '../wording/site-clock';
import type { FirstTry } from './first-tries';

/**
 * First-try outcomes by day of the site, one value for each calendar day from the first to the last: the share that
 * tripped, NaN for a day without a first try.
 */
export function outcomesByDay(counted: readonly FirstTry[], timeZone: string): number[] {
	const days = new Map<string, { k: number; m: number }>();
	for (const one of counted) {
		const { date } = siteClock(one.start.startedAt, timeZone);
		const day = days.get(date) ?? { k: 0, m: 0 };
		days.set(date, { k: day.k + (one.tripped ? 1 : 0), m: day.m + 1 });
	}
	const dates = [...days.keys()].sort();
	const [first, last] = [dates[0], dates.at(-1)];
	if (first === undefined || last === undefined) return [];
	const outcomes: number[] = [];
	for (let at = Date.parse(first); at <= Date.parse(last); at += 86_400_000) {
		const day = days.get(new Date(at).toISOString().slice(0, 10));
		outcomes.push(day ? day.k / day.m : NaN);
	}
	return outcomes;
}

/** How many first tries count as one independent one (see {@link dependence}), from their outcomes by day. */
export function dependenceOf(counted: readonly FirstTry[], timeZone: string): { rho: number; d: number } {
	return dependence(outcomesByDay(counted, timeZone));
}
