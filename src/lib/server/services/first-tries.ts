import type { StartRecord } from '$lib/model/start';
import { firstTries, tally } from '$lib/server/analysis/comparison/first-tries';
import { wilson } from '$lib/server/analysis/statistics/wilson';

export type FirstTryCounts = { m: number; k: number; low: number | null; high: number | null };

/** Counts of eligible first tries, and of those that ended in a start-up trip, with Wilson's 95 % interval of the share. */
export function countFirstTries(records: readonly StartRecord[]): FirstTryCounts {
	const { k, m } = tally(firstTries(records).counted);
	const interval = wilson(k, m);
	return { m, k, low: interval?.low ?? null, high: interval?.high ?? null };
}

/** How many of the latest first starts tripped without one between that held. */
export function trippedInARow(records: readonly StartRecord[]): number {
	let n = 0;
	for (const record of records.filter((entry) => entry.firstStart && !entry.attended).reverse()) {
		if (record.startupTrip) n++;
		else if (record.outcome === 'held') break;
	}
	return n;
}
