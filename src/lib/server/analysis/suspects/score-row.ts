import { SIGNALS } from '$lib/model/signals';
import type { Clue } from '$lib/model/suspect';
import { listWords } from '../wording/quantity-words';
import type { ClueRule, Need, SuspectRow } from './clue-rule';
import type { Context } from './context';
import type { Readable } from './trace-reader';

/** A clue speaks from this strength on: less is noise and would only lengthen the page [ours]. */
const LEAST_STRENGTH = 0.08;
/** A check of this weight against a suspect overrules the log; an indicative one (half) does not. */
const OVERRULES_FROM = 0.75;

/** A row of the table judged on the evidence, before suspects are set against each other. */
export type ScoredRow = {
	row: SuspectRow;
	clues: Clue[];
	/** Sum of weights for, minus sum of weights against. */
	score: number;
	/** Greatest weight of a clue that discriminates. */
	discriminator: number;
	/** A settled field check speaks against it. */
	overruled: boolean;
	/** Signals that discriminating clues lack, with the weight they would have had. */
	missing: Map<string, number>;
};

/** Signals that a need lacks: none when any of its alternatives is logged, else those of the best. */
function lackingOf(need: Need, context: Context): string[] {
	const alternatives: readonly Readable[] = typeof need === 'string' ? [need] : need;
	const lacking = alternatives.map((trace) => context.reader.lacking(trace));
	return lacking.some((one) => one.length === 0) ? [] : (lacking[0] ?? []);
}

function missingClue(rule: ClueRule, weight: number, lacking: readonly string[]): Clue {
	const names = lacking.map((id) => SIGNALS[id as keyof typeof SIGNALS]?.label ?? id);
	const sentence =
		lacking.length > 0
			? `Cannot be read: the log has no ${listWords(names)}.`
			: 'Cannot be read around these starts: too few readings, or no such start.';
	return { key: rule.key, direction: 'missing', weight, sentence, figures: {}, starts: [] };
}

function readRule(rule: ClueRule, context: Context, applies: number): { clue: Clue | null; lacking: string[] } {
	// A nature that is not known halves once, however much of it is not known.
	const share = Math.min(applies, rule.applies?.(context.nature) ?? 1);
	if (share === 0) return { clue: null, lacking: [] };
	const lacking = [...new Set(rule.needs.flatMap((need) => lackingOf(need, context)))];
	if (lacking.length > 0) return { clue: missingClue(rule, rule.weight * share, lacking), lacking };
	const reading = rule.read(context);
	if (reading === null) return { clue: missingClue(rule, rule.weight * share, []), lacking: [] };
	if (!(reading.strength >= LEAST_STRENGTH)) return { clue: null, lacking: [] };
	const clue: Clue = {
		key: rule.key,
		direction: rule.direction,
		weight: rule.weight * share * reading.strength,
		sentence: reading.sentence,
		figures: reading.figures,
		starts: reading.starts.map((start) => start.startedAt),
		...(reading.show ? { show: reading.show } : {})
	};
	return { clue, lacking: [] };
}

/**
 * Reads every clue of one row. A nature that is not known halves a clue; what does not apply is left out.
 * @returns null when the suspect does not apply to the unit
 */
export function scoreRow(row: SuspectRow, context: Context): ScoredRow | null {
	const applies = row.applies(context.nature);
	if (applies === 0) return null;
	const scored: ScoredRow = { row, clues: [], score: 0, discriminator: 0, overruled: false, missing: new Map() };
	for (const rule of row.clues) {
		const { clue, lacking } = readRule(rule, context, applies);
		if (!clue) continue;
		scored.clues.push(clue);
		if (clue.direction === 'for') scored.score += clue.weight;
		if (clue.direction === 'against') scored.score -= clue.weight;
		if (clue.direction === 'against' && rule.overrules && clue.weight >= OVERRULES_FROM) scored.overruled = true;
		if (clue.direction === 'for' && rule.discriminates)
			scored.discriminator = Math.max(scored.discriminator, clue.weight);
		if (rule.discriminates)
			for (const id of lacking) scored.missing.set(id, Math.max(scored.missing.get(id) ?? 0, clue.weight));
	}
	if (scored.overruled) scored.discriminator = 0;
	return scored;
}
