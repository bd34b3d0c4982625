import type { Interval } from '$lib/model/series';
import type { Circuit } from '../circuit';
import { plainWords } from '../outcomes/words';
import { median, sampledQuantile } from '../series/numbers';
import { firstAtOrAfter, lastAtOrBefore } from '../series/search';
import { readingsWithin } from '../series/window';
import { freezePoint } from '../water/properties';

/** What holds a flat capacity: a named limit, nothing, or not to be told because these are not logged. */
export type Limiting = { verdict: 'stall' | 'limited' | 'cannot-tell'; limiting: string | null };

/** How near a quantity must be to its limit to be the one that holds the capacity [ours]. */
const NEAR = { current: 3, saturation: 1.5, condensing: 3, oil: 3, discharge: 5 };
/** Where no cut-out is set, condensing above this may be what a controller limits on, °C [ours]. */
const HIGH_CONDENSING = { water: 46, air: 60 };

/** Which limit was in force over a stretch of flat capacity at `level` %, by the log's own words, else by nearness. */
export function limitingOver(circuit: Circuit, stretch: Interval, level: number): Limiting {
	const said = limitWords(circuit, stretch);
	if (said !== null && said !== '') return { verdict: 'limited', limiting: said };
	const near = nearLimits(circuit, stretch, level);
	const name = near.find((state) => typeof state === 'string');
	if (typeof name === 'string') return { verdict: 'limited', limiting: name };
	if (said === null && near.includes(null)) return { verdict: 'cannot-tell', limiting: null };
	return { verdict: 'stall', limiting: null };
}

const NO_LIMIT = /^(none|no( active)? limits?|normal|off|inactive|ok|0+|not (limited|limiting)|unlimited|n a|)$/;
const NAMES: readonly (readonly [RegExp, string])[] = [
	[/\b(current|amps?|motor|rla|fla)\b/, 'motor current'],
	[/\b(cond(ens(er|ing))?|head|high press(ure)?|hp)\b/, 'condensing'],
	[/\b(disch(arge)?)\b/, 'discharge temperature'],
	[/\b(oil)\b/, 'oil temperature'],
	[/\b(evap(orator)?|suct(ion)?|sat(uration)?|low press(ure)?|refrig(erant)?)\b/, 'evaporator saturation'],
	[/\b(ramp|soft|load(ing)? rate|pull ?down)\b/, 'loading ramp'],
	[/\b(demand|external|ext|remote|bms|capacity|load|shed)\b/, 'external demand limit']
];

/** The limit the log names over most of a stretch; '' = it says that none is in force; null = it does not say. */
function limitWords(circuit: Circuit, stretch: Interval): string | null {
	const texts = circuit.input.texts.activeLimit;
	if (texts === undefined) return null;
	const first = Math.max(0, lastAtOrBefore(texts.t, stretch.from));
	const end = firstAtOrAfter(texts.t, stretch.to);
	const counts = new Map<string, number>();
	for (let i = first; i < end; i++) {
		const plain = plainWords(texts.text[i] ?? '');
		const key = NO_LIMIT.test(plain) ? '' : plain;
		counts.set(key, (counts.get(key) ?? 0) + 1);
	}
	let most: [string, number] | null = null;
	for (const entry of counts) if (most === null || entry[1] > most[1]) most = entry;
	if (most === null) return null;
	const [text] = most;
	return text === '' ? '' : (NAMES.find(([words]) => words.test(text))?.[1] ?? text);
}

/** Does the log name a limit, other than a loading ramp, over most of a stretch? */
export function namesLimit(circuit: Circuit, stretch: Interval): boolean {
	const said = limitWords(circuit, stretch);
	return said !== null && said !== '' && said !== 'loading ramp';
}

/** For each quantity a controller may limit on: its name when near, false when not, null when not known. */
function nearLimits(circuit: Circuit, stretch: Interval, level: number): (string | false | null)[] {
	const at = stretch.from;
	const middle = (id: Parameters<Circuit['trace']>[0]) => {
		const series = circuit.trace(id);
		return series === undefined ? null : median(readingsWithin(series, stretch.from, stretch.to).v);
	};
	const evap = middle('evapSaturation');
	const cutout = circuit.limit('evapSaturationCutout', at) ?? freezePoint(circuit.input.nature.evapFluid ?? undefined);
	const cond = middle('condSaturation');
	const air = circuit.input.nature.condenser === 'air';
	const condCutout = circuit.limit('condSaturationCutout', at);
	const condNear = condCutout === null ? HIGH_CONDENSING[air ? 'air' : 'water'] : condCutout - NEAR.condensing;
	const optional = (
		id: 'oilTemp' | 'dischargeTemp',
		key: 'oilTempCutout' | 'dischargeTempCutout',
		by: number,
		name: string
	) => {
		const value = middle(id);
		const limit = circuit.limit(key, at);
		return value !== null && limit !== null && value >= limit - by ? name : false;
	};
	return [
		nearCurrent(circuit, stretch, level, middle('motorCurrent')),
		evap === null ? null : evap <= cutout + NEAR.saturation && 'evaporator saturation',
		cond === null ? null : cond >= condNear && 'condensing',
		optional('oilTemp', 'oilTempCutout', NEAR.oil, 'oil temperature'),
		optional('dischargeTemp', 'dischargeTempCutout', NEAR.discharge, 'discharge temperature')
	];
}

/**
 * Near the current limit: within 3 points of the configured limit, else of 100 %, of rated. Where nobody gave the rated
 * current, only a capacity seen elsewhere well above this level at no more current shows that current held it.
 */
function nearCurrent(circuit: Circuit, stretch: Interval, level: number, amps: number | null): string | false | null {
	const current = circuit.trace('motorCurrent');
	if (current === undefined || amps === null) return null;
	const rated = current.measure === 'pctRated' ? 100 : circuit.input.nature.ratedAmps;
	if (rated) {
		const limit = circuit.limit('currentLimit', stretch.from) ?? 100;
		return (amps / rated) * 100 >= limit - NEAR.current && 'motor current';
	}
	const most = sampledQuantile(current.v, 0.995) ?? Infinity;
	if (amps < 0.97 * most) return false;
	const capacity = circuit.trace('capacity');
	if (capacity === undefined || capacity.t !== current.t) return false;
	let above = 0;
	for (let i = 0; i < capacity.v.length; i++) {
		if ((capacity.v[i] ?? NaN) >= level + 5 && (current.v[i] ?? NaN) <= 1.01 * amps) above++;
	}
	return above >= 5 && 'motor current';
}
