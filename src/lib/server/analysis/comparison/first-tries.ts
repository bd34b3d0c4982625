import type { StartRecord } from '$lib/model/start';
import { quantile } from '../statistics/quantile';

export type FirstTry = { start: StartRecord; tripped: boolean };
export type Excluded = { start: StartRecord; reason: string };
export type FirstTries = { counted: FirstTry[]; excluded: Excluded[] };

const seconds = (start: StartRecord) => (start.endedAt === null ? Infinity : (start.endedAt - start.startedAt) / 1000);

/** Run times of the start-up trips among the starts, seconds. */
export function tripTimes(starts: readonly StartRecord[]): number[] {
	return starts.filter((start) => start.startupTrip).map(seconds);
}

function reasonAgainst(start: StartRecord, cleanFrom: number | null): string | null {
	if (start.attended) return 'somebody was at the unit, or it ran in manual or test';
	if (start.layUp) return 'it followed a lay-up of more than 7 days';
	if (start.outcome === 'lost') return 'the log does not show how it ended';
	if (start.outcome === 'unclear') return 'the log cannot say why it stopped';
	if (start.tryNumber > 1) return `it was try ${start.tryNumber} of its episode, which is not independent of the first`;
	if (start.outcome === 'called-off' && cleanFrom === null) return 'it was called off before it could be told';
	if (start.outcome === 'called-off' && seconds(start) < (cleanFrom ?? 0))
		return 'it was called off before most trips would have come';
	return null;
}

/**
 * The first tries that count, and why the others do not. m = counted ones, k = those that were start-up trips.
 * A called-off start counts as clean only if it outlived the 90th percentile of the trip times.
 * Method: method.md, "Comparing two groups of starts".
 * @param among the starts whose trip times set that percentile (default: the same starts)
 */
export function firstTries(starts: readonly StartRecord[], among: readonly StartRecord[] = starts): FirstTries {
	const cleanFrom = quantile(tripTimes(among), 0.9);
	const counted: FirstTry[] = [];
	const excluded: Excluded[] = [];
	for (const start of starts) {
		const reason = reasonAgainst(start, cleanFrom);
		if (reason === null) counted.push({ start, tripped: start.startupTrip });
		else excluded.push({ start, reason });
	}
	return { counted, excluded };
}

/** k and m of counted first tries. */
export function tally(counted: readonly FirstTry[]): { k: number; m: number } {
	return { k: counted.filter((one) => one.tripped).length, m: counted.length };
}
