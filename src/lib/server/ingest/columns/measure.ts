import { MEASURES, toStored, type MeasureKey, type Quantity } from '$lib/model/quantities';
import { SIGNALS, type SignalKey } from '$lib/model/signals';
import { measuresFor } from '../values/units';
import { isSentinel } from '../values/words';
import { rangeOf } from './ranges';
import type { ColumnSample } from './sample';

/** The system a log is written in; null while nothing tells. */
export type LogSystem = 'ip' | 'si' | null;

/** Units that a column without one may be in, by system, likeliest first. */
const UNSAID: Readonly<Partial<Record<Quantity, { ip: MeasureKey[]; si: MeasureKey[] }>>> = {
	temperature: { ip: ['degF'], si: ['degC'] },
	temperatureDifference: { ip: ['degFdiff'], si: ['K'] },
	pressure: { ip: ['psig', 'psia'], si: ['kPag', 'kPa', 'barg', 'bar', 'MPa'] },
	pressureDifference: { ip: ['psid'], si: ['kPad', 'bard'] },
	flow: { ip: ['gpm'], si: ['lps', 'm3h'] },
	power: { ip: ['kW'], si: ['kW', 'W'] },
	percent: { ip: ['pct'], si: ['pct'] },
	frequency: { ip: ['Hz', 'rpm'], si: ['Hz', 'rpm'] },
	current: { ip: ['A'], si: ['A'] },
	voltage: { ip: ['V'], si: ['V'] },
	count: { ip: ['count'], si: ['count'] },
	hours: { ip: ['h'], si: ['h'] },
	state: { ip: ['onoff'], si: ['onoff'] },
	text: { ip: ['text'], si: ['text'] }
};

/** Units a column may be in as a signal: those its header allows, else all of its quantity. Empty: the header's unit contradicts. */
export function possibleMeasures(sample: ColumnSample, signal: SignalKey, system: LogSystem): MeasureKey[] {
	const { quantity } = SIGNALS[signal];
	if (sample.unit && quantity !== 'text') {
		const said = measuresFor(sample.unit, quantity);
		if (said.length > 0) return said;
		if (quantity === 'current' && sample.unit.includes('pct')) return ['pctRated'];
		return quantity === 'state' || quantity === 'count' ? (UNSAID[quantity]?.si ?? []) : [];
	}
	const words = sample.words.join(' ');
	if (quantity === 'current' && /\b(rla|fla|pct|percent|rated)\b/.test(words)) return ['pctRated'];
	const all = UNSAID[quantity];
	if (!all) return [];
	if (system) return all[system];
	return [...new Set([...all.ip, ...all.si])];
}

/**
 * Share of a column's figures inside a signal's range when read in a unit. Where the unit is not said, a median that is
 * unusual halves it: that tells °F from °C.
 */
export function fitOf(sample: ColumnSample, signal: SignalKey, measure: MeasureKey, air: number): number {
	const { wide, usual } = rangeOf(signal);
	if (MEASURES[measure].quantity === 'current' && measure === 'pctRated') {
		return sample.shape.most <= 200 && sample.shape.least >= -10 ? 1 : 0.3;
	}
	let within = 0;
	let n = 0;
	for (const x of sample.v) {
		if (Number.isNaN(x)) continue;
		n++;
		const stored = toStored(x, measure, air);
		if (stored >= wide[0] && stored <= wide[1]) within++;
		else if (isSentinel(x)) n--;
	}
	if (n === 0) return 0.5;
	if (sample.unit?.length === 1) return within / n;
	const middle = toStored(sample.shape.median, measure, air);
	return (within / n) * (middle >= usual[0] && middle <= usual[1] ? 1 : 0.5);
}

/** Percent written 0 to 1: figures between the ends, none above one. */
export function isFraction(sample: ColumnSample): boolean {
	const { most, least, distinct, binary } = sample.shape;
	return !binary && distinct > 2 && most <= 1.2 && most > 0.15 && least >= -0.05;
}

/**
 * Whether a log's temperatures without a unit are °F or °C: every column named as a temperature votes with how well it
 * fits either way, and units that are said elsewhere vote too. `sure` is false when the vote is close.
 */
export function decideSystem(
	columns: readonly { sample: ColumnSample; signal: SignalKey | null }[],
	air: number
): { system: LogSystem; sure: boolean; votes: number } {
	let vote = 0;
	let unsaid = 0;
	for (const { sample, signal } of columns) {
		const said = sample.unit?.[0];
		if (said === 'degF' || said === 'psig' || said === 'gpm' || said === 'psia') vote += 2;
		else if (said === 'degC' || said === 'lps' || said === 'barg' || said === 'kPag' || said === 'm3h') vote -= 2;
		if (sample.unit || !signal || SIGNALS[signal].quantity !== 'temperature' || sample.shape.numbers === 0) continue;
		unsaid++;
		const f = fitOf(sample, signal, 'degF', air);
		const c = fitOf(sample, signal, 'degC', air);
		vote += Math.log((f + 0.03) / (c + 0.03));
	}
	if (vote === 0) return { system: null, sure: unsaid === 0, votes: unsaid };
	return { system: vote > 0 ? 'ip' : 'si', sure: unsaid === 0 || Math.abs(vote) > 1.2, votes: unsaid };
}
