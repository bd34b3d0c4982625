import type { Interval } from '$lib/model/series';
import { isGapBefore } from '../series/spacing';
import type { RunningReadings } from './running';

/** One stretch of running. Times in ms UTC, uncertainties in seconds. */
export type Run = {
	/** The first running reading. */
	startedAt: number;
	/** Seconds before `startedAt` within which it really started. */
	startUncertainty: number;
	/** False for a run that was already on at the log's beginning or after a gap: that is no start. */
	observed: boolean;
	/** The first off reading; the last running reading when the run is lost at a gap; null at the log's end. */
	endedAt: number | null;
	lastOn: number;
	endUncertainty: number;
	/** `gap-off`: off when the log comes back; `gap-on`: on again, but it cannot be the same run. */
	end: 'off' | 'gap-off' | 'gap-on' | 'log-end';
	holes: Interval[];
	/** First off reading of the rest before; null when nothing is known of it. */
	restFrom: number | null;
	/** The rest began before the log did, or touches a gap. */
	restAtLeast: boolean;
};

/** What the walk has to ask of the rest of the log. */
export type RunQuestions = {
	/** Is a gap inside running one run with a hole? (No start counter moved, no cold signature.) */
	sameRunAcross: (gap: Interval) => boolean;
	/** Is a trip recorded in an off this short? */
	tripRecordedIn: (off: Interval) => boolean;
};

/** An off under 20 s is no stop unless a trip is recorded in it [ours]. */
const SHORT_OFF = 20_000;
/** Off before and on after a gap: a start inside it is told up to this length, with its uncertainty [ours]. */
const START_IN_GAP = 300_000;

type Walk = { runs: Run[]; current: Run | null; offFrom: number | null; offAtLeast: boolean };

/**
 * Runs from on/off readings. A first running reading, or one after a gap, opens a run that is no start; a gap is not an
 * off; a gap inside a run is a hole or loses the run. One pass over the readings.
 */
export function findRuns(readings: RunningReadings, questions: RunQuestions): Run[] {
	const { t, on } = readings;
	const walk: Walk = { runs: [], current: null, offFrom: null, offAtLeast: true };
	for (let i = 0; i < t.length; i++) {
		const at = t[i] ?? NaN;
		const isOn = on[i] === 1;
		if (i === 0) {
			if (isOn) walk.current = openRun(at, 0, false, null, true);
			else walk.offFrom = at;
			continue;
		}
		const before = t[i - 1] ?? NaN;
		const gap = readings.logging === 'change' ? readings.interrupted[i] === 1 : isGapBefore(t, i);
		if (isOn && walk.current !== null) stayOn(walk, at, before, gap, questions);
		else if (!isOn && walk.current !== null) goOff(walk, at, before, gap, readings.logging);
		else if (isOn) goOn(walk, at, before, gap, readings.logging, questions);
		else if (gap) walk.offAtLeast = true;
	}
	if (walk.current !== null) walk.runs.push(walk.current);
	return walk.runs;
}

function openRun(at: number, uncertainty: number, observed: boolean, restFrom: number | null, atLeast: boolean): Run {
	return {
		startedAt: at,
		startUncertainty: uncertainty,
		observed,
		endedAt: null,
		lastOn: at,
		endUncertainty: 0,
		end: 'log-end',
		holes: [],
		restFrom,
		restAtLeast: atLeast
	};
}

function stayOn(walk: Walk, at: number, before: number, gap: boolean, questions: RunQuestions): void {
	const run = walk.current;
	if (run === null) return;
	if (gap && !questions.sameRunAcross({ from: before, to: at })) {
		run.endedAt = before;
		run.end = 'gap-on';
		run.endUncertainty = (at - before) / 1000;
		walk.runs.push(run);
		walk.current = openRun(at, 0, false, null, true);
		return;
	}
	if (gap) run.holes.push({ from: before, to: at });
	run.lastOn = at;
}

/** A change-of-value record stands at its own instant, so its edge is known to a second. */
function edgeUncertainty(at: number, before: number, logging: RunningReadings['logging']): number {
	return logging === 'change' ? 1 : (at - before) / 1000;
}

function goOff(walk: Walk, at: number, before: number, gap: boolean, logging: RunningReadings['logging']): void {
	const run = walk.current;
	if (run === null) return;
	run.endedAt = at;
	run.end = gap ? 'gap-off' : 'off';
	run.endUncertainty = gap ? (at - before) / 1000 : edgeUncertainty(at, before, logging);
	// A change-of-value run has no readings between its edges.
	if (logging === 'change' && !gap) run.lastOn = Math.max(run.lastOn, at - 1000);
	walk.runs.push(run);
	walk.current = null;
	walk.offFrom = at;
	walk.offAtLeast = gap;
}

function goOn(
	walk: Walk,
	at: number,
	before: number,
	gap: boolean,
	logging: RunningReadings['logging'],
	questions: RunQuestions
): void {
	const previous = walk.runs.at(-1);
	const offFrom = walk.offFrom;
	const short = offFrom !== null && at - offFrom < SHORT_OFF && !gap && previous?.end === 'off';
	if (short && previous !== undefined && !questions.tripRecordedIn({ from: offFrom, to: at })) {
		walk.runs.pop();
		walk.current = { ...previous, endedAt: null, end: 'log-end', endUncertainty: 0, lastOn: at };
		return;
	}
	const observed = !gap || at - before <= START_IN_GAP;
	const uncertainty = gap ? (at - before) / 1000 : edgeUncertainty(at, before, logging);
	walk.current = openRun(at, uncertainty, observed, offFrom, walk.offAtLeast || gap);
}
