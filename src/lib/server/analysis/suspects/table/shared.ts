import type { FieldCheckFact } from '$lib/model/checks';
import type { StartRecord, TripKind } from '$lib/model/start';
import { median } from '../../statistics/median';
import { countWords } from '../../wording/quantity-words';
import { telling } from '../clue-builders';
import type { ClueReading, ClueRule } from '../clue-rule';
import type { Context } from '../context';
import { ramp } from '../strength';

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

/** Without a cut-out on record, a difference under this moves no oil, kPa: common practice, no source. */
const LEAST_DIFFERENCE = 60;

/** Stops by an oil or difference protection, and those nobody recorded that ended with hardly any difference built. */
export function differenceStops(context: Context): StartRecord[] {
	const least = 1.15 * (context.limit('systemDeltaCutout') ?? LEAST_DIFFERENCE);
	return context.bad.filter((start) => {
		const kind = start.trip?.kind ?? 'unknown';
		if (kind !== 'unknown') return kind === 'low-pressure-difference' || kind === 'oil-flow';
		// In the first minute no machine has built it.
		if ((start.endedAt ?? 0) - start.startedAt < 60_000) return false;
		const last = context.reader.last('systemDelta', (start.endedAt ?? 0) - 500, 90_000);
		return last !== null && last <= least;
	});
}

/**
 * Which share of the pressure difference that moves the oil is lost before the compressor, median over the starts asked
 * for, from 30 s to 20 min after the start. Only of starts with 80 kPa or more between condenser and evaporator.
 */
export function oilShareLost(context: Context): { share: number; drop: number; starts: StartRecord[] } | null {
	const lost = (start: StartRecord, asShare: boolean) => {
		const difference = context.window('systemDelta', 30, 1200, [start]);
		const net = context.window('oilNet', 30, 1200, [start]);
		if (!difference || !net || difference.value < 80) return null;
		const drop = difference.value - net.value;
		return asShare ? drop / difference.value : drop;
	};
	const share = context.gather(telling(context), (start) => lost(start, true));
	const drop = context.gather(telling(context), (start) => lost(start, false));
	return share && drop ? { share: share.value, drop: drop.value, starts: share.starts } : null;
}

/**
 * Oil pressure lost between its source and the compressor, on machines whose oil is moved by the pressure difference: a
 * clean line costs a tenth to a quarter of it, half is a restriction. Common practice, no source.
 */
export const oilPressureLost = (direction: 'for' | 'against', weight: number): ClueRule => ({
	key: 'oil-pressure-lost',
	direction,
	weight,
	discriminates: direction === 'for',
	needs: ['oilNet', 'systemDelta'],
	read: (context) => {
		const lost = oilShareLost(context);
		if (!lost) return null;
		return {
			strength: ramp(lost.share, 0.35, 0.55),
			sentence: `Oil pressure stands ${context.words.pressureDifference(lost.drop)} under its source, ${Math.round(100 * lost.share)} % of the difference that moves it, median of ${countWords(lost.starts.length, 'start')}.`,
			figures: { drop: lost.drop, share: lost.share },
			starts: lost.starts.slice(-5),
			show: { signals: ['oilPressure', 'condPressure', 'evapPressure'], from: 0, to: 600 }
		};
	}
});
