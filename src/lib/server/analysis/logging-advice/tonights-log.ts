import { SIGNALS, type SignalKey } from '$lib/model/signals';
import type { StartRecord } from '$lib/model/start';
import type { SuspectKey, SuspectsResult } from '$lib/model/suspect';
import type { UnitNature } from '$lib/model/unit';
import { SUSPECT_WORDS } from '$lib/model/words';
import { median } from '../statistics/median';
import type { ClueRule, Need } from '../suspects/clue-rule';
import { SUSPECT_TABLE } from '../suspects/table';
import { type Readable, signalsOf } from '../suspects/trace-reader';
import { countWords, listWords } from '../wording/quantity-words';

export type LogPoint = { signal: SignalKey; label: string; spacingSeconds: number; when: string; why: string };
export type TonightsLog = {
	sentence: string;
	/** Names of the suspects that the points would keep apart. */
	separates: string[];
	points: LogPoint[];
};

type ReadAt = NonNullable<ClueRule['readAt']>;
/** How finely and when each kind of reading is logged [ours]. */
const PLAN: Readonly<Record<ReadAt, { spacingSeconds: number; when: string }>> = {
	start: { spacingSeconds: 5, when: 'for 15 min after each start' },
	run: { spacingSeconds: 30, when: 'while it runs' },
	rest: { spacingSeconds: 60, when: 'overnight, until the next start' }
};
const FINEST: readonly ReadAt[] = ['start', 'run', 'rest'];
/** More points than this nobody sets up in an evening [ours]. */
const MOST_POINTS = 10;

export type AdviceInput = {
	suspects: SuspectsResult;
	nature: UnitNature;
	starts: readonly StartRecord[];
	/** Signals that are logged. */
	logged: ReadonlySet<SignalKey>;
};

/** The two suspects to be kept apart: the leaders, else those that the missing signals would speak about most. */
function leaders(suspects: SuspectsResult): SuspectKey[] {
	const possible = suspects.suspects.filter((one) => one.standing !== 'speaks-against');
	const promise = (index: number) =>
		(possible[index]?.clues ?? []).reduce(
			(sum, clue) => sum + (clue.direction === 'against' ? -clue.weight : clue.weight),
			0
		);
	const standing = possible.filter((one) => one.standing === 'points-to' || one.standing === 'fits');
	const others = possible
		.map((one, i) => ({ one, promise: promise(i) }))
		.filter(({ one }) => !standing.includes(one))
		.sort((a, b) => b.promise - a.promise)
		.map(({ one }) => one);
	return [...standing, ...others].slice(0, 2).map((one) => one.key);
}

/** The signals of a need, or of its best alternative that is logged. */
function wished(need: Need, logged: ReadonlySet<SignalKey>): SignalKey[] {
	const alternatives: readonly Readable[] = typeof need === 'string' ? [need] : need;
	const best = alternatives.find((trace) => signalsOf(trace).every((signal) => logged.has(signal))) ?? alternatives[0];
	return best === undefined ? [] : signalsOf(best);
}

type Wish = { at: ReadAt; weight: number; suspects: Set<string>; missing: boolean };

function wishesOf(keys: readonly SuspectKey[], input: AdviceInput, coarse: boolean): Map<SignalKey, Wish> {
	const wishes = new Map<SignalKey, Wish>();
	for (const row of SUSPECT_TABLE.filter((one) => keys.includes(one.key)))
		for (const rule of row.clues) {
			if ((rule.applies?.(input.nature) ?? 1) === 0) continue;
			const at = rule.readAt ?? 'start';
			for (const signal of rule.needs.flatMap((need) => wished(need, input.logged))) {
				const missing = !input.logged.has(signal);
				if (!missing && !(coarse && at === 'start')) continue;
				const wish = wishes.get(signal) ?? { at, weight: 0, suspects: new Set(), missing };
				wish.weight += rule.weight * (missing ? 2 : 1);
				wish.suspects.add(SUSPECT_WORDS[row.key].toLowerCase());
				if (FINEST.indexOf(at) < FINEST.indexOf(wish.at)) wish.at = at;
				wishes.set(signal, wish);
			}
		}
	return wishes;
}

/**
 * What to log until tomorrow so that the two leading suspects can be told apart: the signals their clues lack, and, at a
 * spacing too coarse for the time to trip, those they have, more finely. Null when nothing is missing or suspected.
 */
export function tonightsLog(input: AdviceInput): TonightsLog | null {
	if (input.suspects.verdict === 'no-fault-pattern') return null;
	const keys = leaders(input.suspects);
	const spacing = median(input.starts.map((start) => start.spacingSeconds)) ?? 0;
	const wishes = wishesOf(keys, input, spacing > 10);
	const points = [...wishes]
		.sort((a, b) => b[1].weight - a[1].weight)
		.slice(0, MOST_POINTS)
		.map(([signal, wish]) => ({
			signal,
			label: SIGNALS[signal].label,
			...PLAN[wish.at],
			why: `${wish.missing ? 'not logged yet' : `logged every ${Math.round(spacing)} s, too coarse`}; speaks about ${listWords([...wish.suspects])}`
		}));
	if (points.length === 0) return null;
	const separates = keys.map((key) => SUSPECT_WORDS[key]);
	const between =
		separates.length === 2 ? `keep ${listWords(separates.map((name) => name.toLowerCase()))} apart` : 'tell';
	return {
		sentence: `With ${countWords(points.length, 'point')} logged until tomorrow, the next first start can ${between}.`,
		separates,
		points
	};
}
