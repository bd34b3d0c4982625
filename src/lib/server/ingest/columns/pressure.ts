import { MEASURES, toStored, type MeasureKey } from '$lib/model/quantities';
import { SIGNALS, type SignalKey } from '$lib/model/signals';
import type { Choice, ReadContext } from '../types';
import type { Guess } from './guess';
import { pairUp } from './pairs';
import { roughSaturation } from './saturation';

/** Which logged temperature tells a pressure's kind, and how far the saturation lies from it (K, and tolerance). */
const WITNESSES: Readonly<Partial<Record<SignalKey, readonly [SignalKey, offset: number, tolerance: number][]>>> = {
	evapPressure: [
		['evapSaturation', 0, 2.5],
		['evapWaterOut', -2, 5]
	],
	condPressure: [
		['condSaturation', 0, 2.5],
		['condWaterOut', 2, 4]
	],
	dischargePressure: [
		['condSaturation', 0.5, 3.5],
		['condWaterOut', 2.5, 4.5]
	]
};

function isPressure(guess: Guess): boolean {
	return guess.signal !== null && SIGNALS[guess.signal].quantity === 'pressure' && guess.measure !== null;
}

/** Median of |saturation of the pressure − witness − offset|, K, with the pressure read in a unit; null without pairs. */
function misfit(guess: Guess, witness: Guess, offset: number, measure: MeasureKey, ctx: ReadContext): number | null {
	const unit = [ctx.unit, ...ctx.siblings].find((u) => u.unitId === guess.unitId) ?? ctx.unit;
	const errors: number[] = [];
	for (const [i, k] of pairUp(guess.sample, witness.sample)) {
		const [p, t] = [guess.sample.v[i] ?? NaN, witness.sample.v[k] ?? NaN];
		if (Number.isNaN(p) || Number.isNaN(t) || !witness.measure) continue;
		const saturation = roughSaturation(unit.refrigerant, toStored(p, measure, ctx.airPressure));
		if (saturation === null) continue;
		errors.push(Math.abs(saturation - toStored(t, witness.measure) - offset));
	}
	if (errors.length < 5) return null;
	errors.sort((a, b) => a - b);
	return errors[Math.floor(errors.length / 2)] ?? null;
}

/** Settles one pressure by a witness; true when it told. */
function settle(guess: Guess, guesses: readonly Guess[], ctx: ReadContext): boolean {
	for (const [signal, offset, tolerance] of WITNESSES[guess.signal ?? 'alarm'] ?? []) {
		const own = SIGNALS[signal].scope === 'unit';
		const witness = guesses.find(
			(g) =>
				g.signal === signal && g.unitId === guess.unitId && (own || g.circuit === guess.circuit) && g.confidence >= 0.6
		);
		if (!witness || !guess.measure) continue;
		const rated = [guess.measure, ...guess.rivals]
			.map((measure) => ({ measure, misfit: misfit(guess, witness, offset, measure, ctx) }))
			.filter((r): r is { measure: MeasureKey; misfit: number } => r.misfit !== null)
			.sort((a, b) => a.misfit - b.misfit);
		const [best, next] = rated;
		if (!best || best.misfit > tolerance || (next && next.misfit < best.misfit + tolerance)) continue;
		guess.measure = best.measure;
		guess.reasons.push(`${MEASURES[best.measure].symbol}: its saturation agrees with ${SIGNALS[signal].label}`);
		return true;
	}
	return false;
}

/** Units that say outright whether they are gauge or absolute; `psi`, `bar` and `kPa` do not. */
function isPlain(guess: Guess): boolean {
	return guess.sample.unit !== null && guess.sample.unit.length === 1;
}

/**
 * Gauge or absolute: pressures whose unit leaves it open are held against the logged saturation of their side, or
 * against the water. What stays open follows the other pressures of the file, else gauge, and is asked where it matters.
 */
export function settlePressures(guesses: readonly Guess[], ctx: ReadContext): Choice[] {
	const open = guesses.filter((g) => isPressure(g) && !isPlain(g));
	if (open.length === 0) return [];
	const left: Guess[] = [];
	const told = new Map<string, MeasureKey>();
	const key = (g: Guess) => `${g.sample.file}|${g.sample.unitText}`;
	for (const guess of open) {
		if (settle(guess, guesses, ctx) && guess.measure) told.set(key(guess), guess.measure);
		else left.push(guess);
	}
	const answer = ctx.answers?.pressure;
	for (const guess of left) {
		const sibling = told.get(key(guess)) ?? [...told.values()][0];
		const all = [guess.measure, ...guess.rivals];
		if (sibling && all.includes(sibling)) guess.measure = sibling;
		else if (answer === 'gauge' || answer === 'absolute') {
			guess.measure =
				all.find((m) => m !== null && (MEASURES[m].gauge === true) === (answer === 'gauge')) ?? guess.measure;
		} else guess.confidence *= guess.sample.unitText.toLowerCase().startsWith('psi') ? 0.95 : 0.8;
	}
	if (told.size > 0 || left.length === 0) return [];
	const first = left[0];
	const gauge = first?.measure ? MEASURES[first.measure].gauge === true : true;
	const needed = left.some(
		(g) =>
			g.signal === 'evapPressure' &&
			!guesses.some((o) => o.signal === 'evapSaturation' && o.circuit === g.circuit && o.unitId === g.unitId)
	);
	const sample = `${first?.sample.column ?? ''} ${first?.sample.cells.find((c) => c.trim() !== '') ?? ''}`;
	return [
		{
			key: 'pressure',
			question: 'Are the pressures of this log gauge or absolute?',
			chosen: answer ?? (gauge ? 'gauge' : 'absolute'),
			options: [
				{ value: 'gauge', label: 'gauge', sample: `${sample} above the air's pressure` },
				{ value: 'absolute', label: 'absolute', sample: `${sample} above vacuum` }
			],
			sure: answer !== undefined || !needed || first?.sample.unitText.toLowerCase().startsWith('psi') === true
		}
	];
}
