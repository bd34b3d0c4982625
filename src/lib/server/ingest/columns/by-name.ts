import type { SignalKey } from '$lib/model/signals';
import type { Quantity } from '$lib/model/quantities';
import { sensesOf, type Idea } from './lexicon';
import { NAME_RULES, SPOILERS, type NameRule } from './rules';

/** A signal a name may mean, and how sure the name alone makes it, 0…1. */
export type NameGuess = { signal: SignalKey; sure: number };

/** What a unit of measure adds to a name: `Evap (psig)` is a pressure. */
const OF_QUANTITY: Partial<Record<Quantity, Idea>> = {
	temperature: 'temperature',
	pressure: 'pressure',
	flow: 'flow',
	current: 'current',
	voltage: 'voltage',
	frequency: 'speed',
	hours: 'hours',
	state: 'run'
};

function scoreOf(rule: NameRule, ideas: ReadonlySet<Idea>, fromUnit: Idea | null, unknown: number): number {
	for (const set of rule.all) if (!set.some((idea) => ideas.has(idea) || idea === fromUnit)) return 0;
	let sure = rule.sure;
	for (const idea of ideas) {
		if (idea === 'neutral' || rule.may.includes(idea) || rule.all.some((set) => set.includes(idea))) continue;
		if (rule.signal === 'alarm' && !['setpoint', 'limit', 'starts', 'hours', 'foreign'].includes(idea)) continue;
		if (idea === 'percent' || idea === 'average' || idea === 'active') sure *= 0.95;
		else sure *= SPOILERS.has(idea) ? 0.25 : 0.6;
	}
	// A word nobody knows may change the meaning, though tags, sites and numbers seldom do.
	// Where no word says evaporator or condenser, the unknown one might have.
	const sideless = (rule.signal === 'evapWaterOut' || rule.signal === 'evapWaterIn') && !ideas.has('evap');
	return sure * Math.max(sideless ? 0.7 : 0.8, 1 - (sideless ? 0.09 : 0.035) * unknown);
}

/**
 * Signals that a name's words may mean, surest first. Every idea a rule does not account for takes away from it.
 * @param quantity what the unit of measure in the header says is measured, or null
 */
export function guessByName(words: readonly string[], quantity: Quantity | null): NameGuess[] {
	const senses = sensesOf(words);
	const ideas = new Set(senses.flatMap((sense) => sense.ideas));
	const unknown = senses.filter((sense) => sense.ideas.length === 0 && !/^\d+$/.test(sense.words)).length;
	const fromUnit = quantity === null ? null : (OF_QUANTITY[quantity] ?? null);
	const best = new Map<SignalKey, number>();
	for (const rule of NAME_RULES) {
		const sure = scoreOf(rule, ideas, fromUnit, unknown);
		if (sure > (best.get(rule.signal) ?? 0)) best.set(rule.signal, sure);
	}
	return [...best]
		.map(([signal, sure]) => ({ signal, sure }))
		.sort((a, b) => b.sure - a.sure)
		.slice(0, 4);
}
