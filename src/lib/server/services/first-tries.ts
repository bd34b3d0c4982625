import type { StartRecord } from '$lib/model/start';
import { wilson } from '$lib/server/analysis/statistics/wilson';

export type FirstTries = { m: number; k: number; low: number | null; high: number | null };

/** The 90th percentile of the times to a start-up trip, seconds: a called-off start that outlived it counts as clean. */
function longTripTime(records: readonly StartRecord[]): number {
	const times = records
		.flatMap((record) => (record.startupTrip && record.trip ? [(record.trip.at - record.startedAt) / 1000] : []))
		.sort((a, b) => a - b);
	return times.at(Math.min(times.length - 1, Math.floor(times.length * 0.9))) ?? 0;
}

/** First tries that count (method.md, "the unit of analysis is the episode"): unattended, no lay-up, told apart. */
export function eligibleFirstTries(records: readonly StartRecord[]): StartRecord[] {
	const enough = longTripTime(records);
	return records.filter((record) => {
		if (record.tryNumber !== 1 || record.attended || record.layUp) return false;
		if (record.outcome === 'held' || record.outcome === 'tripped') return true;
		if (record.outcome !== 'called-off' || record.endedAt === null) return false;
		return (record.endedAt - record.startedAt) / 1000 > enough;
	});
}

/** Counts of eligible first tries, and of those that ended in a start-up trip, with Wilson's 95 % interval of the share. */
export function countFirstTries(records: readonly StartRecord[]): FirstTries {
	const tries = eligibleFirstTries(records);
	const k = tries.filter((record) => record.startupTrip).length;
	const interval = wilson(k, tries.length);
	return { m: tries.length, k, low: interval?.low ?? null, high: interval?.high ?? null };
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
