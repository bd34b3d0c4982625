import type { DecisiveCheck, SuspectKey, SuspectResult } from '$lib/model/suspect';
import { SUSPECT_WORDS } from '$lib/model/words';
import { listWords } from '../wording/quantity-words';

/** A field check that would tell suspects apart, and which it decides. */
export type NextCheck = DecisiveCheck & { decides: SuspectKey[]; sentence: string };

/** At most so many suspects are held against each other, and so many checks listed: a visit does no more. */
const MOST_SUSPECTS = 5;
const MOST_CHECKS = 4;
/** What each tool to bring, and stopping the unit, take off a check's worth [ours]. */
const EFFORT = { tool: 0.02, unitOff: 0.08 };

const stands = ({ standing }: SuspectResult) => standing === 'points-to' || standing === 'fits';

/** Weights for, minus weights against: never under a little, so that the last of the named still counts. */
function massOf({ clues }: SuspectResult): number {
	const sum = clues.reduce(
		(total, { direction, weight }) =>
			direction === 'for' ? total + weight : direction === 'against' ? total - weight : total,
		0
	);
	return Math.max(0.05, sum);
}

/** The named suspects; without one, those that have something for them. */
function leading(suspects: readonly SuspectResult[]): SuspectResult[] {
	const named = suspects.filter(stands);
	const some = suspects.filter(
		({ standing, clues }) => standing !== 'speaks-against' && clues.some(({ direction }) => direction === 'for')
	);
	return (named.length > 0 ? named : some).slice(0, MOST_SUSPECTS);
}

const names = (keys: readonly SuspectKey[]) => listWords(keys.map((key) => SUSPECT_WORDS[key].toLowerCase()));

function sentenceOf(decides: readonly SuspectKey[], others: readonly SuspectKey[]): string {
	if (others.length === 0) return `Confirms ${names(decides)}, or clears ${decides.length === 1 ? 'it' : 'them'}.`;
	return `Parts ${names(decides)} from ${names(others)}.`;
}

/**
 * The field checks to do next, ordered by what they separate: a check splits the weight of the leading suspects into
 * what it decides, p, and the rest; 4·p·(1−p) is most when both halves weigh alike. What has to be brought and whether
 * the unit must be stopped take a little off; of two alike the one that decides the stronger suspect comes first
 * (method.md, suspects: ordered by what they separate, effort, and whether the unit must be stopped).
 */
export function nextChecks(suspects: readonly SuspectResult[]): NextCheck[] {
	const held = leading(suspects);
	const whole = held.reduce((total, suspect) => total + massOf(suspect), 0);
	const byKey = new Map<string, { check: DecisiveCheck; decides: SuspectKey[]; mass: number }>();
	for (const suspect of held) {
		const check = suspect.decisiveCheck;
		const entry = byKey.get(check.key) ?? { check, decides: [], mass: 0 };
		entry.decides.push(suspect.key);
		entry.mass += massOf(suspect);
		byKey.set(check.key, entry);
	}
	const worth = ({ check, mass }: { check: DecisiveCheck; mass: number }) => {
		const p = mass / whole;
		return 4 * p * (1 - p) - EFFORT.tool * check.tools.length - (check.unitOff ? EFFORT.unitOff : 0);
	};
	return [...byKey.values()]
		.sort((a, b) => worth(b) - worth(a) || b.mass - a.mass)
		.slice(0, MOST_CHECKS)
		.map(({ check, decides }) => ({
			...check,
			decides,
			sentence: sentenceOf(
				decides,
				held.map(({ key }) => key).filter((key) => !decides.includes(key))
			)
		}));
}
