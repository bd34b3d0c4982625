import type { ChangeFact } from '$lib/model/checks';
import type { CircuitInput } from '$lib/model/circuit-input';
import type { UnitSystem } from '$lib/model/quantities';
import type { Interval } from '$lib/model/series';
import type { TraceKey } from '$lib/model/signals';
import type { FigureKey, StartRecord } from '$lib/model/start';
import { quantile } from '../statistics/quantile';
import { chanceWords, countWords, listWords, type Words, wordsFor } from '../wording/quantity-words';
import { type Envelope, envelopesOf, type Landmark, landmarksOf, readerOf } from './aligned-traces';
import { daysCovered } from './coverage';
import { type CrossTable, crossTableOf } from './cross-table';
import { type Difference, differencesOf, strongestPossible } from './differences';
import { type FirstTries, firstTries, tripTimes } from './first-tries';
import { type GroupExpression, parseGroup } from './group-grammar';
import { type Matched, matchedComparison } from './matched';
import { type Share, shareOf, type SplitTest, splitTest } from './proportions';
import { type GroupContext, groupWords, selectGroup } from './select-group';
import { reachWords, tellingFirst } from './telling';

export type ComparisonInput = {
	/** All starts of the circuit or unit in the period, oldest first. */
	starts: readonly StartRecord[];
	/** Group expressions. */
	a: string;
	b: string;
	timeZone: string;
	changes: readonly ChangeFact[];
	idOf?: (start: StartRecord) => string;
	covered: readonly Interval[];
	period: Interval;
	/** The circuit's series, for landmarks and envelopes; null compares stored figures only. */
	input: CircuitInput | null;
	units?: UnitSystem;
};

export type GroupResult = {
	expression: string;
	label: string;
	firstTries: Share;
	starts: StartRecord[];
	/** Starts that are shown and not counted, with the reason. */
	excluded: FirstTries['excluded'];
};

export type ComparisonResult = {
	sentences: string[];
	chance: string | null;
	coverageSentence: string | null;
	tooFew: string | null;
	a: GroupResult;
	b: GroupResult;
	split: SplitTest | null;
	matched: Matched | null;
	differences: Difference[];
	footnote: string | null;
	landmarks: Landmark[];
	envelopes: Envelope[];
	horizonSeconds: number | null;
	crossTable: CrossTable | null;
	presets: { label: string; a: string; b: string }[];
};

/** Ready-made pairs of groups. */
export function presetsFor(changes: readonly ChangeFact[]): ComparisonResult['presets'] {
	const latest = [...changes].sort((one, two) => two.at - one.at)[0];
	return [
		{ label: 'First starts and short rests', a: 'first', b: 'later&try=1' },
		{ label: 'Morning and afternoon', a: 'clock<11:00&try=1', b: 'clock>=12:00&try=1' },
		{ label: 'Tripped and held', a: 'outcome:tripped', b: 'outcome:held' },
		...(latest
			? [{ label: 'Before and after the last change', a: `before:${latest.id}`, b: `after:${latest.id}` }]
			: [])
	];
}

const figuresOf = (expression: GroupExpression): FigureKey[] =>
	expression.terms.flatMap((term) => (term.kind === 'figure' ? [term.figure] : []));
const asksForTries = (expression: GroupExpression) =>
	expression.terms.some((term) => term.kind === 'try' || term.kind === 'ids');

/** Starts whose figures are compared: nobody at the unit, no lay-up, not lost; later tries only where asked for. */
function comparable(starts: readonly StartRecord[], expression: GroupExpression): StartRecord[] {
	return starts.filter(
		(start) =>
			!start.layUp &&
			start.outcome !== 'lost' &&
			(!start.attended || asksForTries(expression)) &&
			(start.tryNumber === 1 || asksForTries(expression))
	);
}

function tooFewWords(a: number, b: number): string | null {
	if (a === 0 || b === 0) return 'One of the groups holds no start: there is nothing to compare.';
	if (strongestPossible(a, b) > 0.05)
		return `Too few starts to test: even the most uneven split of ${a} and ${b} would come up by chance ${chanceWords(strongestPossible(a, b))}.`;
	return null;
}

function differenceSentence(row: Difference, labels: readonly [string, string], words: Words): string {
	const say = (value: number | null) => words.of(value, row.quantity);
	return `${row.label} was ${row.words} in “${labels[0]}”: ${say(row.a)} against ${say(row.b)}${reachWords(row, words)}.`;
}

/** What is said where no tested figure is worth a sentence. */
function nothingToldWords(clear: number): string {
	if (clear === 0) return 'None of the tested figures differs clearly between the groups.';
	return 'The tested figures that differ clearly do so by too little to matter; they stand in the table.';
}

function rateSentence(a: GroupResult, b: GroupResult): string {
	const part = (group: GroupResult) =>
		`${group.firstTries.k} of ${countWords(group.firstTries.m, 'first try', 'first tries')}`;
	return `“${a.label}”: ${part(a)} tripped. “${b.label}”: ${part(b)}.`;
}

function chanceSentence(split: SplitTest | null, a: Share, b: Share): string | null {
	if (!split || a.k + b.k === 0) return null;
	return `Were both groups alike, chance alone would set them this far apart (${a.k} of ${a.m}, ${b.k} of ${b.m}) ${chanceWords(split.chance)}.`;
}

function matchedSentence(matched: Matched | null, definedByOutcome: boolean): string | null {
	if (definedByOutcome) return null;
	if (!matched) return 'Too few alike starts to match the groups on condenser and leaving water.';
	return `Matched on ${listWords(matched.matchedOn)}, ${matched.pairs} pairs: ${matched.a} against ${matched.b} tripped; by chance ${chanceWords(matched.chance)}.`;
}

function footnoteOf(rows: readonly Difference[], split: SplitTest | null): string | null {
	const tested = rows.filter((row) => row.role === 'tested');
	const sizes = tested[0];
	if (!sizes) return split ? `Rates: ${split.method}.` : null;
	return (
		`${split ? `Rates: ${split.method}. ` : ''}Exact Mann–Whitney on ${countWords(tested.length, 'figure')}, kept together at 5 % after Benjamini and Hochberg; ` +
		`the rest is exploratory. The strongest result these counts allow: ${chanceWords(strongestPossible(sizes.countA, sizes.countB))}.`
	);
}

function groupResult(expression: GroupExpression, starts: StartRecord[], comparison: ComparisonInput, words: Words) {
	const tries = firstTries(starts, comparison.starts);
	const result: GroupResult = {
		expression: expression.text,
		label: groupWords(expression, contextOf(comparison), words),
		firstTries: shareOf(tries.counted, comparison.timeZone),
		starts,
		excluded: tries.excluded
	};
	return { result, counted: tries.counted };
}

const contextOf = ({ timeZone, changes, idOf }: ComparisonInput): GroupContext => ({
	timeZone,
	changes,
	...(idOf ? { idOf } : {})
});

function coverageWords(comparison: ComparisonInput, expression: GroupExpression): string | null {
	const found = daysCovered(comparison.covered, comparison.period, expression, comparison.timeZone);
	return found.days === 0 ? null : `In the logs you gave: ${found.covered} of ${found.days} ${found.what} covered.`;
}

/** What of the low side defines the trips of these groups, so that landmarks only describe it. */
function describedTraces(starts: readonly StartRecord[]): Set<TraceKey> {
	const kinds = new Set(starts.map((start) => start.trip?.kind));
	const described = new Set<TraceKey>();
	if (kinds.has('low-evaporator-saturation') || kinds.has('low-suction-pressure'))
		for (const trace of ['evapSaturation', 'evapApproach'] as const) described.add(trace);
	if (kinds.has('high-condensing')) described.add('condSaturation');
	return described;
}

/**
 * Two groups of starts side by side: rates by episode, figures, landmarks, envelopes, the cross table of clock and rest,
 * and the sentences. Starts that both groups hold are left out of both and said.
 * Method: method.md, "Comparing two groups of starts".
 * @throws GroupExpressionError when an expression cannot be read
 */
export function compareGroups(comparison: ComparisonInput): ComparisonResult {
	const words = wordsFor(comparison.units ?? 'si');
	const [expressionA, expressionB] = [parseGroup(comparison.a), parseGroup(comparison.b)];
	const context = contextOf(comparison);
	const inA = selectGroup(comparison.starts, expressionA, context);
	const inB = selectGroup(comparison.starts, expressionB, context);
	const shared = new Set(inA.filter((start) => inB.includes(start)));
	const one = groupResult(
		expressionA,
		inA.filter((start) => !shared.has(start)),
		comparison,
		words
	);
	const two = groupResult(
		expressionB,
		inB.filter((start) => !shared.has(start)),
		comparison,
		words
	);
	const [a, b] = [one.result, two.result];
	const definedBy = new Set([...figuresOf(expressionA), ...figuresOf(expressionB)]);
	const byOutcome = [expressionA, expressionB].some((expression) =>
		expression.terms.some((term) => term.kind === 'outcome' || term.kind === 'trip')
	);
	const figuresA = comparable(a.starts, expressionA);
	const figuresB = comparable(b.starts, expressionB);
	const differences = differencesOf(figuresA, figuresB, definedBy);
	const split = byOutcome ? null : splitTest(one.counted, two.counted, comparison.timeZone);
	const matched = byOutcome ? null : matchedComparison(one.counted, two.counted, definedBy);
	const tooFew = tooFewWords(figuresA.length, figuresB.length);
	const labels = [a.label, b.label] as const;
	const clear = differences.filter((row) => row.clear && row.role === 'tested');
	const told = tellingFirst(clear).map((row) => differenceSentence(row, labels, words));
	const reader = comparison.input ? readerOf(comparison.input) : null;
	const crossTable = crossTableOf([...one.counted, ...two.counted], comparison.timeZone, words);
	const sentences = [
		...(byOutcome ? [] : [rateSentence(a, b)]),
		...told,
		...(told.length === 0 && tooFew === null ? [nothingToldWords(clear.length)] : []),
		matchedSentence(matched, byOutcome || tooFew !== null),
		shared.size > 0
			? `${countWords(shared.size, 'start')} in both groups ${shared.size === 1 ? 'was' : 'were'} left out.`
			: null
	].filter((sentence) => sentence !== null);
	return {
		sentences,
		chance: chanceSentence(split, a.firstTries, b.firstTries),
		coverageSentence: coverageWords(comparison, expressionA),
		tooFew,
		a,
		b,
		split,
		matched,
		differences,
		footnote: footnoteOf(differences, split),
		landmarks: reader ? landmarksOf(reader, figuresA, figuresB, describedTraces([...figuresA, ...figuresB])) : [],
		envelopes: reader ? envelopesOf(reader, figuresA, figuresB) : [],
		horizonSeconds: quantile(tripTimes([...figuresA, ...figuresB]), 0.1),
		crossTable,
		presets: presetsFor(comparison.changes)
	};
}
