import type { CircuitInput } from '$lib/model/circuit-input';
import { valueInForce } from '../series/hold';
import { lastReading, readingsWithin } from '../series/window';
import { plainWords } from '../outcomes/words';
import { lastAtOrBefore } from '../series/search';
import type { Run } from './runs';

/** A rest over seven days is a lay-up, s. */
const LAY_UP = 604_800;

/** The rest before a run and what it makes of the start. `firstStartRest` in s. */
export function readRest(input: CircuitInput, run: Run, firstStartRest: number) {
	const restSeconds = run.restFrom === null ? null : (run.startedAt - run.restFrom) / 1000;
	const firstStart = restSeconds !== null && restSeconds >= firstStartRest;
	return {
		restSeconds,
		restAtLeast: restSeconds !== null && run.restAtLeast,
		firstStart,
		circuitFirst: firstStart,
		unitFirst: firstStart && !sistersRan(input, run.startedAt, firstStartRest),
		layUp: restSeconds !== null && restSeconds > LAY_UP
	};
}

/** Did another circuit of the unit run in the first-start rest before an instant? */
function sistersRan(input: CircuitInput, at: number, rest: number): boolean {
	return input.others.some(
		(other) => other.sameUnit && readingsWithin(other.running, at - rest * 1000, at - 1).v.some((v) => v >= 0.5)
	);
}

/** How many of the unit's other circuits and the site's other units ran at an instant. */
export function othersRunningAt(input: CircuitInput, at: number): number {
	return input.others.filter((other) => valueInForce('running', other.running, at, 600) >= 0.5).length;
}

const BY_HAND = /\b(manual|hand|test|service|maintenance|commissioning)\b/;

/** Was a person at the unit when it started: a visit, or a mode that says manual, hand, test or service. */
export function isAttended(input: CircuitInput, at: number): boolean {
	if (input.visits.some((visit) => at >= visit.from && at <= visit.to)) return true;
	const mode = input.texts.unitMode;
	if (mode === undefined) return false;
	return BY_HAND.test(plainWords(mode.text[lastAtOrBefore(mode.t, at)] ?? ''));
}

/** Edges this far apart are worth a note, s. */
const EDGES_APART = 30;

/** Notes on edges that do not agree: a start command that rose more than 30 s before the status (pre-lube, timers). */
export function edgeNotes(input: CircuitInput, run: Run): string[] {
	const command = input.series.startCommand;
	if (command === undefined) return [];
	const before = readingsWithin(command, run.startedAt - 1_800_000, run.startedAt);
	let rose: number | null = null;
	for (let i = 1; i < before.t.length; i++) {
		if ((before.v[i] ?? 0) >= 0.5 && (before.v[i - 1] ?? 0) < 0.5) rose = before.t[i] ?? null;
	}
	const on = (lastReading(command, run.startedAt, 1800)?.value ?? 0) >= 0.5;
	const apart = rose === null ? 0 : (run.startedAt - rose) / 1000;
	return on && apart > EDGES_APART ? [`The start command came ${Math.round(apart)} s before the compressor ran.`] : [];
}
