import type { ChangeFact } from '$lib/model/checks';
import type { UnitSystem } from '$lib/model/quantities';
import type { StartRecord } from '$lib/model/start';
import { dependenceOf } from '../comparison/day-outcomes';
import { type Excluded, firstTries, type FirstTry, tally } from '../comparison/first-tries';
import { countWords, type Words, wordsFor } from '../wording/quantity-words';
import { cleanStillNeeded, eThreshold, eValue } from './e-value';
import { conditionsOf, type Exposure, exposureOf, notExposed } from './exposure';

const DAY = 86_400_000;
/** "Before" is this long (method.md, "Proof after a change"). */
const BEFORE_DAYS = 28;
/** A season: when more exposed starts are needed than it brings, that is said. */
const SEASON_DAYS = 91;

export type ProofInput = {
	/** All starts of the circuit, oldest first. */
	starts: readonly StartRecord[];
	change: ChangeFact;
	/** Which change of its case this is: 1, 2, … */
	changeNumber: number;
	/** When the case was opened, ms UTC; null when the change belongs to none. */
	caseOpenedAt: number | null;
	/** Other changes, to be listed when they fall into the window. */
	otherChanges: readonly ChangeFact[];
	timeZone: string;
	/** Setpoint at a start where it is logged. */
	setpointOf?: (start: StartRecord) => number | null;
	/** End of what is known, ms UTC. */
	until: number;
	units?: UnitSystem;
};

export type Proof = {
	state: 'changed' | 'not-yet' | 'too-little-before' | 'no-exposed-start';
	/** k′, m′ after the opening trip is taken out and after ÷ d; d itself; plain counts beside them. */
	before: { k: number; m: number; d: number; countedK: number; countedM: number; openingTrip: number | null };
	after: { t: number; c: number; days: number };
	e: number | null;
	threshold: number;
	cleanStillNeeded: number | null;
	withinSeason: boolean | null;
	excluded: Excluded[];
	leftOut: string[];
	otherChanges: ChangeFact[];
	sentences: string[];
};

/** The trip that opened the case: the last start-up trip at or before the call. */
function openingTrip(counted: readonly FirstTry[], input: ProofInput): StartRecord | null {
	const by = input.caseOpenedAt ?? input.change.at;
	const tripped = counted.filter((one) => one.tripped && one.start.startedAt <= by);
	return tripped.at(-1)?.start ?? null;
}

function countBefore(input: ProofInput) {
	const window = input.starts.filter(
		(start) => start.startedAt >= input.change.at - BEFORE_DAYS * DAY && start.startedAt < input.change.at
	);
	const all = firstTries(window);
	const failing = all.counted.filter((one) => one.tripped).map((one) => one.start);
	const exposure = exposureOf(failing, conditionsOf(input.setpointOf ?? (() => null)));
	const counted = all.counted.filter((one) => !exposure.firstStartsOnly || one.start.firstStart);
	const opening = openingTrip(counted, input);
	const plain = tally(counted);
	const rest = tally(counted.filter((one) => one.start !== opening));
	const { d } = dependenceOf(counted, input.timeZone);
	return {
		exposure,
		before: {
			k: rest.k / d,
			m: rest.m / d,
			d,
			countedK: plain.k,
			countedM: plain.m,
			openingTrip: opening?.startedAt ?? null
		}
	};
}

function countAfter(input: ProofInput, exposure: Exposure, words: Words) {
	const since = input.starts.filter((start) => start.startedAt >= input.change.at);
	const { counted, excluded } = firstTries(since, input.starts);
	const exposed: FirstTry[] = [];
	for (const one of counted) {
		const reason = notExposed(one.start, exposure, words);
		if (reason === null) exposed.push(one);
		else excluded.push({ start: one.start, reason });
	}
	excluded.sort((a, b) => a.start.startedAt - b.start.startedAt);
	const { k, m } = tally(exposed);
	const last = exposed.at(-1)?.start.startedAt ?? input.change.at;
	return { t: k, c: m - k, days: (last - input.change.at) / DAY, excluded };
}

function sentencesOf(proof: Omit<Proof, 'sentences'>, words: Words): string[] {
	const { before, after } = proof;
	const lines: string[] = [];
	if (proof.state === 'too-little-before') lines.push('Too little before the change to prove anything.');
	if (proof.state === 'no-exposed-start') lines.push('No exposed start since the change.');
	if (proof.state === 'changed')
		lines.push(
			`Something changed: ${after.t} of ${countWords(after.t + after.c, 'exposed first start')} tripped since, against ${before.countedK} of ${before.countedM} before.`
		);
	if (proof.state === 'not-yet' && proof.withinSeason === false)
		lines.push('Not within this season: it tripped too rarely before for clean starts to show much.');
	else if (proof.state === 'not-yet' && proof.cleanStillNeeded !== null)
		lines.push(`${countWords(proof.cleanStillNeeded, 'more clean exposed start')} would prove it.`);
	if (proof.state === 'not-yet' && proof.cleanStillNeeded === 0)
		lines[lines.length - 1] =
			`The starts are enough; ${words.of(Math.max(0, 7 - after.days), 'count')} more days of them are wanted.`;
	if (proof.leftOut.length > 0) lines.push(`Not logged and left out of the matching: ${proof.leftOut.join(', ')}.`);
	if (proof.otherChanges.length > 0)
		lines.push(`Also changed in the window: ${proof.otherChanges.map((change) => change.text).join('; ')}.`);
	return lines;
}

/** How many exposed starts a season brings, at the pace since the change (or, within the first days, before it). */
function seasonBrings(after: { t: number; c: number; days: number }, before: Proof['before']): number {
	const since = after.days >= 5 ? (after.t + after.c) / after.days : 0;
	return SEASON_DAYS * Math.max(since, before.countedM / BEFORE_DAYS);
}

/**
 * Has something changed since a change? Counts eligible first tries before and exposed ones after, and weighs them with
 * the E value. Proved when E reaches 1/α_j with five clean starts or more over seven days or more.
 * Method: method.md, "Proof after a change".
 * @throws RangeError when the change number is no whole number ≥ 1
 */
export function prove(input: ProofInput): Proof {
	const words = wordsFor(input.units ?? 'si');
	const threshold = eThreshold(input.changeNumber);
	const { before, exposure } = countBefore(input);
	const { excluded, ...after } = countAfter(input, exposure, words);
	const usable = before.k > 0;
	const e = usable ? eValue(before, after) : null;
	const needed = usable ? cleanStillNeeded(before, after, threshold) : null;
	const reached = e !== null && e >= threshold && after.c >= 5 && after.days >= 7;
	const state = !usable
		? 'too-little-before'
		: after.t + after.c === 0
			? 'no-exposed-start'
			: reached
				? 'changed'
				: 'not-yet';
	const proof = {
		state,
		before,
		after,
		e,
		threshold,
		cleanStillNeeded: needed,
		withinSeason: usable ? needed !== null && needed <= seasonBrings(after, before) : null,
		excluded,
		leftOut: exposure.leftOut,
		otherChanges: input.otherChanges.filter(
			(change) =>
				change.id !== input.change.id && change.at >= input.change.at - BEFORE_DAYS * DAY && change.at <= input.until
		)
	} as const;
	return { ...proof, sentences: sentencesOf(proof, words) };
}
