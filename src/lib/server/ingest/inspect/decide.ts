import { SIGNALS, type SignalKey } from '$lib/model/signals';
import { isAnonymous, SURE, type Guess } from '../columns/guess';
import type { Choice } from '../types';

/** Signals that tell when the compressor runs; one of them at least is needed. */
export const RUN_SIGNALS: readonly SignalKey[] = ['running', 'motorCurrent', 'power', 'speed', 'capacity'];
/** Signals whose doubt a person settles before starts are judged by them. */
const NEEDED: readonly SignalKey[] = [...RUN_SIGNALS, 'startCommand', 'evapSaturation', 'evapPressure'];

function sure(guess: Guess): boolean {
	return guess.signal !== null && guess.confidence >= SURE;
}

/** Columns in doubt that a start needs: no sure column carries the same signal. */
function doubts(guesses: readonly Guess[], ask: boolean): string[] {
	const questions: string[] = [];
	const runs = guesses.some((g) => g.signal === 'running' && sure(g));
	for (const guess of guesses) {
		if (!guess.signal || sure(guess) || guess.confidence < 0.45 || !NEEDED.includes(guess.signal)) continue;
		const same = guesses.some((g) => g !== guess && g.signal === guess.signal && sure(g) && g.unitId === guess.unitId);
		// Where nobody waits to be asked, a log that says when it runs is not held up for its command.
		const spared = RUN_SIGNALS.includes(guess.signal) || (!ask && guess.signal === 'startCommand');
		const running = guess.signal !== 'running' && spared && runs;
		const saturated = guess.signal === 'evapPressure' && guesses.some((g) => g.signal === 'evapSaturation' && sure(g));
		if (same || running || saturated) continue;
		questions.push(`Is "${guess.sample.column}" the ${SIGNALS[guess.signal].label}?`);
	}
	return questions;
}

/** What a person must answer before the log can be read, one sentence each; empty when nothing. */
export function openQuestions(
	guesses: readonly Guess[],
	choices: readonly Choice[],
	known: ReadonlySet<string>,
	ask: boolean
): string[] {
	const questions = choices.filter((choice) => !choice.sure).map((choice) => choice.question);
	if (!guesses.some((g) => g.signal && RUN_SIGNALS.includes(g.signal) && sure(g))) {
		questions.push('No column surely tells when the compressor runs: which one does?');
	}
	questions.push(...doubts(guesses, ask));
	const unknown = new Set(guesses.map((g) => g.unknownUnit).filter((n): n is string => n !== null && !known.has(n)));
	for (const number of unknown)
		questions.push(`Columns carry the number ${number}, which no unit of this site has: whose are they?`);
	return [...new Set(questions)];
}

/** Is nothing in the log known? Names without meaning (`Point 7`) may still be mapped by a person. */
export function nothingKnown(guesses: readonly Guess[]): boolean {
	if (guesses.length === 0) return true;
	if (guesses.some((g) => g.signal !== null && g.confidence >= 0.4)) return false;
	return !guesses.some((g) => isAnonymous(g.sample.words) && g.sample.shape.numbers > 0);
}
