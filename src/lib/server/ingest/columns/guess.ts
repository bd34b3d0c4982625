import type { MeasureKey } from '$lib/model/quantities';
import { SIGNALS, type SignalKey } from '$lib/model/signals';
import type { ReadContext } from '../types';
import { guessByName, type NameGuess } from './by-name';
import { decideSystem, fitOf, isFraction, possibleMeasures, type LogSystem } from './measure';
import { OwnerFinder } from './owner';
import { saidQuantity, type ColumnSample } from './sample';

/** A column with what it is taken for. */
export type Guess = {
	sample: ColumnSample;
	signal: SignalKey | null;
	unitId: string;
	circuit: string;
	measure: MeasureKey | null;
	confidence: number;
	reasons: string[];
	/** A unit number in the name that no unit of the site has. */
	unknownUnit: string | null;
	/** Other units it may be in, likeliest first: gauge or absolute. */
	rivals: MeasureKey[];
};

/** Confidence under which a column is not used without a person. */
export const SURE = 0.8;

/** Signals that several columns of one circuit may carry. */
export const MANY: ReadonlySet<SignalKey> = new Set(['phaseCurrents', 'phaseVoltages', 'windingTemp', 'alarm']);

/** Words that begin most names of a file say whose columns they are, not what: they are left out of the reading. */
function withoutPrefix(names: readonly string[][]): string[][] {
	if (names.length < 4) return names.map((words) => [...words]);
	let shared = 0;
	for (; shared < 6; shared++) {
		const counts = new Map<string, number>();
		for (const words of names) {
			const word = words.length > shared + 1 ? words[shared] : undefined;
			if (word !== undefined) counts.set(word, (counts.get(word) ?? 0) + 1);
		}
		const [most = 0] = [...counts.values()].sort((a, b) => b - a);
		if (most < 0.9 * names.length) break;
	}
	return names.map((words) => words.slice(Math.min(shared, Math.max(0, words.length - 1))));
}

/** How well the kind of cells agrees with a signal's form. */
function formFit(sample: ColumnSample, signal: SignalKey): number {
	const { shape } = sample;
	const { form, quantity } = SIGNALS[signal];
	if (shape.filled === 0) return 0.95;
	const wordy = shape.words + shape.runStates > 0.5 * shape.filled;
	if (form === 'text') {
		if (signal === 'alarm') return shape.numbers === shape.filled && !shape.binary && shape.distinct > 20 ? 0.3 : 1;
		return shape.numbers > 0.8 * shape.filled ? 0.3 : 1;
	}
	if (quantity === 'state') {
		const understood =
			(shape.binary ? shape.numbers : 0) + Math.max(shape.states, signal === 'running' ? shape.runStates : 0);
		const share = understood / shape.filled;
		if (share > 0.85) return 1;
		if (signal === 'running' && share > 0.6) return 0.9;
		return 0.25;
	}
	if (wordy) return 0.15;
	if (shape.numbers < 0.2 * shape.filled) return 0.5;
	if (form === 'counter') return shape.rising || shape.distinct <= 1 || shape.most > 50 ? 1 : 0.5;
	// An analogue that is only ever 0 or 1 is a state under another name, unless the machine never ran.
	if (shape.binary && shape.distinct === 2 && shape.numbers > 20 && !sample.unit) return 0.4;
	return 1;
}

type Choice = {
	signal: SignalKey;
	measure: MeasureKey | null;
	confidence: number;
	reasons: string[];
	rivals: MeasureKey[];
};

function judge(sample: ColumnSample, name: NameGuess, system: LogSystem, air: number): Choice {
	const { signal } = name;
	const reasons = [`the name reads as ${SIGNALS[signal].label}`];
	let confidence = name.sure;
	const form = formFit(sample, signal);
	if (form < 0.9) reasons.push('its cells are not of that kind');
	confidence *= form;
	const measures = possibleMeasures(sample, signal, system);
	if (measures.length === 0) {
		reasons.push(`its unit of measure (${sample.unitText}) is of another quantity`);
		return { signal, measure: null, confidence: confidence * 0.1, reasons, rivals: [] };
	}
	const rated = measures
		.map((measure, i) => ({ measure, fit: fitOf(sample, signal, measure, air) - 0.001 * i }))
		.sort((a, b) => b.fit - a.fit);
	let measure = rated[0]?.measure ?? null;
	const fit = rated[0]?.fit ?? 0;
	if (SIGNALS[signal].quantity === 'percent' && isFraction(sample)) {
		measure = 'frac';
		reasons.push('written 0 to 1');
	} else if (fit < 0.85 && sample.shape.numbers > 0) {
		reasons.push('its figures are unusual for it');
		confidence *= 0.35 + 0.65 * Math.max(0, fit);
	}
	if (sample.unit) reasons.push(`in ${sample.unitText}`);
	return { signal, measure, confidence, reasons, rivals: rated.map((r) => r.measure).filter((m) => m !== measure) };
}

/** A guess from figures alone, for names that say nothing: never sure. */
function byFigures(sample: ColumnSample): { signal: SignalKey; confidence: number } | null {
	const { shape } = sample;
	if (shape.filled === 0) return null;
	if ((shape.binary || shape.states > 0.8 * shape.filled) && shape.distinct === 2)
		return { signal: 'running', confidence: 0.3 };
	if (shape.numbers < 0.5 * shape.filled) return null;
	if (shape.rising && shape.distinct > 2 && Number.isInteger(shape.most))
		return { signal: 'startsCounter', confidence: 0.25 };
	const first = sample.unit?.[0];
	if (first === 'degF' || first === 'degC') return { signal: 'evapWaterOut', confidence: 0.25 };
	if (first === 'psig' || first === 'barg' || first === 'kPag') return { signal: 'evapPressure', confidence: 0.25 };
	if (shape.least >= 0 && shape.most <= 110 && shape.most > 20 && shape.distinct > 5)
		return { signal: 'capacity', confidence: 0.2 };
	return null;
}

/** Is the name a mere number (`Point 7`, `AI-3`, `Column 4`)? */
export function isAnonymous(words: readonly string[]): boolean {
	const rest = words.filter(
		(w) =>
			!/^\d+$/.test(w) &&
			!/^(point|pt|column|col|channel|chan|ch|ai|ao|di|do|bi|bo|av|bv|var|field|value|val|v|signal|series|sensor|trend|tag|data|x|y|unnamed|untitled|c|f|p)$/.test(
				w
			)
	);
	return rest.length === 0;
}

/**
 * What each column is taken for, from its name, unit of measure, kind of cells and range. Conflicts between columns are
 * not settled here.
 */
export function guessColumns(
	samples: readonly ColumnSample[],
	ctx: ReadContext
): { guesses: Guess[]; system: LogSystem; systemSure: boolean } {
	const owners = new OwnerFinder(
		ctx.unit,
		ctx.siblings,
		samples.map((s) => s.words)
	);
	const owned = samples.map((s) => owners.owner(s.words));
	const bare = withoutPrefix(owned.map((o) => o.words));
	const named = samples.map((sample, i) => {
		const quantity = saidQuantity(sample);
		const plain = guessByName(owned[i]?.words ?? [], quantity);
		const short = guessByName(bare[i] ?? [], quantity);
		return (short[0]?.sure ?? 0) > (plain[0]?.sure ?? 0) ? short : plain;
	});
	const decided = decideSystem(
		samples.map((sample, i) => ({
			sample,
			signal: (named[i]?.[0]?.sure ?? 0) > 0.5 ? (named[i]?.[0]?.signal ?? null) : null
		})),
		ctx.airPressure
	);
	const guesses = samples.map((sample, i): Guess => {
		const owner = owned[i];
		const base = {
			sample,
			unitId: owner?.unitId ?? ctx.unit.unitId,
			circuit: owner?.circuit ?? '1',
			unknownUnit: owner?.unknownUnit ?? null
		};
		const judged = (named[i] ?? [])
			.map((name) => judge(sample, name, decided.system, ctx.airPressure))
			.sort((a, b) => b.confidence - a.confidence);
		const best = judged[0];
		if (!best || best.confidence < 0.2) {
			const figures = isAnonymous(owner?.words ?? []) ? byFigures(sample) : null;
			if (!figures)
				return {
					...base,
					signal: null,
					measure: null,
					confidence: 0,
					reasons: ['the name says nothing known'],
					rivals: []
				};
			const measure = possibleMeasures(sample, figures.signal, decided.system)[0] ?? null;
			return { ...base, ...figures, measure, reasons: ['only its figures speak for it'], rivals: [] };
		}
		const next = judged[1];
		// Two readings nearly as good as each other: neither is sure.
		if (next && next.confidence > 0.93 * best.confidence) {
			best.confidence *= 0.85;
			best.reasons.push(`could also be ${SIGNALS[next.signal].label}`);
		}
		return { ...base, ...best, confidence: Math.min(0.99, best.confidence) };
	});
	distrust(guesses, named);
	return { guesses, system: decided.system, systemSure: decided.sure };
}

/** Where many names contradict their figures, the header is not this table's: then no name of it is sure. */
function distrust(guesses: readonly Guess[], named: readonly (readonly NameGuess[])[]): void {
	const plain = guesses.filter((g, i) => g.sample.shape.filled > 0 && (named[i]?.[0]?.sure ?? 0) >= SURE);
	const against = guesses.filter(
		(g, i) => g.sample.shape.filled > 0 && (named[i]?.[0]?.sure ?? 0) >= SURE && g.confidence < 0.6
	);
	if (against.length < 3 || against.length < 0.2 * plain.length) return;
	for (const guess of guesses) {
		guess.confidence *= 0.75;
		guess.reasons.push('many names of this log contradict their figures');
	}
}
