import type { EventRecord } from '$lib/model/series';
import type { TripWord } from '$lib/model/circuit-input';
import { activationsOf, namesAnother, type Activation } from '../outcomes/activations';
import { plainWords } from '../outcomes/words';

/** A run as an alarm or event history tells it. ms UTC; null where no line tells. */
export type HistoryRun = {
	startedAt: number | null;
	endedAt: number | null;
	/** the alarm that ended it; null when a stop line did, or nothing */
	trip: Activation | null;
	/** the stop line's text */
	stopText: string | null;
};

const MACHINE = /\b(comp(ressor)?s?|chiller|unit|machine|motor)\b/;
const STARTED = /\b(started|running|start|on|run)\b/;
const STOPPED = /\b(stopped|stop|off|shut ?down|shutdown)\b/;
/** A command, a permission or a wish is no start; neither is what a start failed to be. */
const NO_EVENT =
	/\b(enabled?|disabled?|commands?|requests?|requested|permit(ted)?|inhibit(ed)?|fail(ed|ure)?|delay(ed)?|pending|count(er)?|hours?|ready|set ?points?|pump|fan|heater|schedule)\b/;
/** Alarms of one stop come together, s [ours]. */
const ONE_STOP = 120;

function lineOf(text: string): 'start' | 'stop' | null {
	const plain = plainWords(text);
	if (!MACHINE.test(plain) || NO_EVENT.test(plain)) return null;
	if (STOPPED.test(plain)) return 'stop';
	return STARTED.test(plain) ? 'start' : null;
}

type Line =
	| { at: number; is: 'start'; text: string }
	| { at: number; is: 'stop'; text: string }
	| { at: number; is: 'trip'; alarm: Activation };

/** Lines that tell of a circuit's running, in time order; alarms within two minutes of each other are one stop's. */
function linesOf(events: readonly EventRecord[], circuit: string, own: readonly TripWord[]): Line[] {
	const mine = events.filter((event) => event.source === 'history' && !namesAnother(event.text, circuit));
	const lines: Line[] = [];
	for (const event of mine) {
		const is = event.what === 'activation' ? lineOf(event.text) : null;
		if (is !== null) lines.push({ at: event.at, is, text: event.text });
	}
	const stops = new Set(lines.flatMap((line) => (line.is === 'stop' ? [line.at] : [])));
	// A start or stop line is no alarm, whatever else its words may say.
	const alarms = activationsOf(
		undefined,
		undefined,
		mine.filter((event) => lineOf(event.text) === null),
		own,
		() => true
	);
	let last = -Infinity;
	for (const alarm of alarms) {
		if (alarm.power || alarm.at - last <= ONE_STOP * 1000) continue;
		last = alarm.at;
		// Of a stop and its alarm in the same second the alarm came first.
		lines.push({ at: stops.has(alarm.at) ? alarm.at - 1 : alarm.at, is: 'trip', alarm });
	}
	return lines.sort((a, b) => a.at - b.at);
}

/**
 * Runs of one circuit from its alarm or event histories alone: start and stop lines where the history has them, and
 * the activations of protective alarms. An alarm without a start line before it is a trip whose start is not known; an
 * alarm after a stop line within two minutes is that stop's reason. Pure; O(lines).
 */
export function runsOfHistory(
	events: readonly EventRecord[],
	circuit: string,
	own: readonly TripWord[] = []
): HistoryRun[] {
	const runs: HistoryRun[] = [];
	let open: HistoryRun | null = null;
	for (const line of linesOf(events, circuit, own)) {
		if (line.is === 'start') {
			if (open !== null) runs.push(open);
			open = { startedAt: line.at, endedAt: null, trip: null, stopText: null };
		} else if (line.is === 'stop') {
			const last: HistoryRun | undefined = runs.at(-1);
			if (open !== null) runs.push({ ...open, endedAt: line.at, stopText: line.text });
			else if (last?.trip && line.at - last.trip.at <= ONE_STOP * 1000) last.endedAt = line.at;
			open = null;
		} else {
			const last: HistoryRun | undefined = runs.at(-1);
			if (open !== null) runs.push({ ...open, endedAt: line.alarm.at, trip: line.alarm });
			else if (last?.endedAt && last.trip === null && line.at - last.endedAt <= ONE_STOP * 1000) last.trip = line.alarm;
			else runs.push({ startedAt: null, endedAt: line.alarm.at, trip: line.alarm, stopText: null });
			open = null;
		}
	}
	if (open !== null) runs.push(open);
	return runs;
}
