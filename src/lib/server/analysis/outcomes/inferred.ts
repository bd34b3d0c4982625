import type { Series } from '$lib/model/series';
import type { Trip, TripKind } from '$lib/model/start';
import type { Circuit } from '../circuit';
import { WATCHES, type Watch } from '../figures/protections';
import { lastReading, readingsWithin } from '../series/window';
import type { Run } from '../starts/runs';
import { freezePoint } from '../water/properties';
import type { StopEvidence } from './evidence';

type Hint = { kind: TripKind; sureness: number; reason: string; past: boolean };

/** Limits learned from the unit's own trips, by protection; null = none learned. */
export type LearnedLimits = Partial<Record<Watch['protection'], number>>;

/**
 * A trip without a record, on evidence only (method.md): the stop was loaded; nothing unloaded, closed or was commanded
 * before it; the water was above setpoint; the spacing is at most 60 s; and a protective quantity was past its limit or
 * running to it. @returns null when any of these is not shown
 */
export function inferTrip(
	circuit: Circuit,
	run: Run,
	stop: number,
	evidence: StopEvidence,
	spacing: number,
	learned: LearnedLimits
): Trip | null {
	if (spacing > 60 || evidence.loaded !== true || evidence.unloaded === true || evidence.valveClosed) return null;
	if (evidence.commandFellAt !== null) return null;
	const hint = flowHint(circuit, run, stop) ?? bestHint(circuit, run, stop, spacing, learned);
	if (hint === null) return null;
	// Water that is only on its way to its limit has met its setpoint before: that stops a machine too.
	if (!hint.past && hint.kind === 'low-leaving-water' && evidence.setpointMet === true) return null;
	if (evidence.waterAbove === false && hint.kind !== 'low-leaving-water' && hint.kind !== 'loss-of-water-flow')
		return null;
	const sureness = evidence.waterAbove === null ? hint.sureness * 0.8 : hint.sureness;
	return { at: stop, kind: hint.kind, basis: 'inferred', text: null, sureness, reason: hint.reason };
}

/**
 * Was a protective quantity past its configured limit in the last 30 s (a spacing and a half where coarser) before a
 * stop? Then a stop that looks normal may still be a trip, and cannot be called either.
 */
export function wasPastLimit(circuit: Circuit, run: Run, stop: number, spacing: number): boolean {
	return WATCHES.some((watch) => {
		const set = watch.limits.some((key) => circuit.limit(key, run.startedAt) !== null);
		const hint = set ? hintOf(circuit, run, stop, spacing, watch, {}) : null;
		return hint !== null && hint.past;
	});
}

/**
 * Did a proof open in the row of the stop and close again within 5 min, so that no pump was stopped? A pump that goes off
 * with the compressor leaves its proof open.
 */
function openedAtStop(series: Series, run: Run, stop: number): boolean {
	const after = readingsWithin(series, run.lastOn + 1, stop + 300_000);
	const closes = after.v.findIndex((v) => v === 1);
	return after.v[0] === 0 && (after.t[0] ?? Infinity) <= stop && closes > 0;
}

/** The flow proof was gone while it still ran, or opened as it stopped with the pump running on. */
function flowHint(circuit: Circuit, run: Run, stop: number): Hint | null {
	for (const [proof, name] of [
		['evapFlowProof', 'Evaporator'],
		['condFlowProof', 'Condenser']
	] as const) {
		const series = circuit.map[proof];
		if (series === undefined) continue;
		const readings = readingsWithin(series, run.startedAt, run.lastOn);
		const last = readings.v.at(-1);
		const whileRunning = last === 0 && run.lastOn - (readings.t.at(-1) ?? 0) <= 60_000;
		if (readings.v.some((v) => v === 1) && (whileRunning || openedAtStop(series, run, stop))) {
			return {
				kind: 'loss-of-water-flow',
				sureness: 0.85,
				reason: `${name} flow proof was lost before the stop.`,
				past: true
			};
		}
	}
	return null;
}

function bestHint(circuit: Circuit, run: Run, stop: number, spacing: number, learned: LearnedLimits): Hint | null {
	let best: Hint | null = null;
	for (const watch of WATCHES) {
		const hint = hintOf(circuit, run, stop, spacing, watch, learned);
		if (hint !== null && (best === null || hint.sureness > best.sureness)) best = hint;
	}
	return best;
}

/** The limit a protection is judged by at an instant: configured, learned, or for the evaporator the freeze point. */
function limitOf(circuit: Circuit, watch: Watch, at: number, learned: LearnedLimits) {
	for (const key of watch.limits) {
		const value = circuit.limit(key, at);
		if (value !== null) return { value, sureness: 0.9, words: 'its limit' };
	}
	const own = learned[watch.protection];
	if (own !== undefined) return { value: own, sureness: 0.8, words: 'where this unit tripped before' };
	if (watch.protection !== 'evapSaturation') return null;
	const fluid = circuit.input.nature.evapFluid ?? undefined;
	return { value: freezePoint(fluid), sureness: 0.6, words: 'the freeze point, no limit being set,' };
}

function hintOf(
	circuit: Circuit,
	run: Run,
	stop: number,
	spacing: number,
	watch: Watch,
	learned: LearnedLimits
): Hint | null {
	const series = circuit.trace(watch.trace);
	const limit = limitOf(circuit, watch, run.startedAt, learned);
	if (series === undefined || limit === null) return null;
	const reach = Math.max(30_000, 1.5 * spacing * 1000);
	const from = Math.max(run.startedAt + watch.from * 1000, run.lastOn - reach);
	// The first off sample still shows what stopped it.
	const readings = readingsWithin(series, from, stop);
	const distance = Array.from(readings.v, (v) => watch.side * (v - limit.value));
	const least = distance.reduce((a, b) => Math.min(a, b), Infinity);
	const say = (how: string) => `${capital(watch.words)} ${how} ${limit.words} at the stop.`;
	if (least <= 0) return { kind: watch.kind, sureness: limit.sureness, reason: say('was past'), past: true };
	if (run.lastOn < from) return null;
	const ahead = runningTo(series, run, spacing, (v) => watch.side * (v - limit.value));
	if (ahead === null || ahead > 0) return null;
	return { kind: watch.kind, sureness: limit.sureness - 0.2, reason: say('was running to'), past: false };
}

/** Distance to the limit one spacing after the last running reading, at the slope of the last 30 s or two readings. */
function runningTo(
	series: NonNullable<ReturnType<Circuit['trace']>>,
	run: Run,
	spacing: number,
	distance: (v: number) => number
): number | null {
	const last = lastReading(series, run.lastOn, spacing * 1.5);
	if (last === null) return null;
	const before = lastReading(series, last.at - Math.max(15_000, spacing * 900), spacing * 2.5);
	if (before === null) return null;
	const slope = (distance(last.value) - distance(before.value)) / (last.at - before.at);
	return slope < 0 ? distance(last.value) + slope * spacing * 1000 : null;
}

function capital(words: string): string {
	return words.charAt(0).toUpperCase() + words.slice(1);
}
