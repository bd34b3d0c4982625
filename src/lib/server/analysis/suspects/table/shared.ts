import type { FieldCheckFact } from '$lib/model/checks';
import type { StartRecord, TripKind } from '$lib/model/start';
import { median } from '../../statistics/median';
import { countWords } from '../../wording/quantity-words';
import type { ClueReading } from '../clue-rule';
import type { Context } from '../context';

/** The latest field check that `pick` takes, or null. */
export function latestCheck<T extends FieldCheckFact>(
	context: Context,
	pick: (check: FieldCheckFact) => T | null
): T | null {
	let found: T | null = null;
	for (const check of context.checks) {
		const taken = pick(check);
		if (taken && (!found || taken.at >= found.at)) found = taken;
	}
	return found;
}

/** Runs long enough to load fully (15 min) whose capacity is known. */
export function capacityRuns(context: Context): StartRecord[] {
	return context.starts.filter(
		(start) =>
			start.figures.peakCapacity !== null && (start.endedAt === null || start.endedAt - start.startedAt >= 15 * 60_000)
	);
}

/** A stall whose limits are not logged counts this much [ours]. */
const UNSURE = 0.5;

export type StallShare = {
	share: number;
	level: number;
	/** 1; 0.5 when the log cannot show whether a limit held the capacity. */
	sureness: number;
	reading: ClueReading;
};

/** Which share of the long runs stalls, at what level; null when there is no stall. */
export function stallShare(context: Context): StallShare | null {
	const runs = capacityRuns(context);
	const sure = context.stalls.length > 0;
	const stalls = sure ? context.stalls : context.maybeStalls;
	const level = median(stalls.map((start) => start.stall?.levelPct ?? NaN));
	if (level === null) return null;
	const demand = median(stalls.map((start) => start.stall?.demandPct ?? NaN));
	const asked = demand === null ? 'more cooling wanted' : `${Math.round(demand)} % demanded`;
	const limits = sure ? 'no limit in force' : 'no limit logged';
	const all = Math.max(stalls.length, runs.length);
	return {
		share: stalls.length / all,
		level,
		sureness: sure ? 1 : UNSURE,
		reading: {
			strength: 0,
			sentence: `Loading stalls at ${Math.round(level)} % with ${asked} and ${limits}, in ${stalls.length} of ${countWords(all, 'long run')}.`,
			figures: { level, stalls: stalls.length, runs: all, ...(demand === null ? {} : { demand }) },
			starts: stalls.slice(-5),
			show: { signals: ['capacity', 'demand', 'evapWaterOut', 'waterSetpoint'], from: 0, to: 3600 }
		}
	};
}

/** Tripped starts of some kinds. */
export function tripsOfKind(context: Context, ...kinds: readonly TripKind[]): StartRecord[] {
	return context.bad.filter((start) => start.trip !== null && kinds.includes(start.trip.kind));
}

/** Share of the tripped starts whose trip is of some kinds, 0 without trips. */
export function kindShare(context: Context, ...kinds: readonly TripKind[]): number {
	return context.bad.length === 0 ? 0 : tripsOfKind(context, ...kinds).length / context.bad.length;
}
