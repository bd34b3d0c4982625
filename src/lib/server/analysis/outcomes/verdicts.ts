import type { LearnedBracket } from '$lib/model/circuit-input';
import type { Circuit } from '../circuit';
import type { FigureContext } from '../figures/sheet';
import { learnBrackets } from '../figures/headroom';
import { correctedVerdict } from '../starts/corrections';
import { latchedAt, type Activation } from './activations';
import { commandTells } from './command';
import { readStop } from './evidence';
import { inferTrip, wasPastLimit, type LearnedLimits } from './inferred';
import { judge, type Verdict } from './judge';
import { matchAlarms } from './match';
import { pumpsStoppedToo } from './pumps';
import { onSchedule, siteClock } from './schedule';

export type Judged = { verdicts: Verdict[]; brackets: LearnedBracket[] };

/**
 * The outcome of every start: alarms are matched to all stops first, limits learned from the recorded trips, and then
 * stops without a record are read for evidence. `contexts` runs in step with the observed runs of the circuit.
 */
export function judgeStarts(
	circuit: Circuit,
	contexts: readonly FigureContext[],
	activations: readonly Activation[]
): Judged {
	const alarms = alarmsOf(circuit, activations);
	const tells = commandTells(
		circuit,
		circuit.runs.map((run) => alarms.get(run.startedAt) !== undefined)
	);
	const alarmFor = (context: FigureContext) => alarms.get(context.observedAt) ?? null;
	const evidence = contexts.map((c) =>
		c.run.end === 'off' ? readStop(circuit, c.run, c.stop, c.spacing, tells) : null
	);
	const scheduled = scheduleMarks(circuit, contexts);
	const pumps = pumpsStoppedToo(circuit);
	const pumpsAt = new Map(circuit.runs.map((run, i) => [run.startedAt, pumps[i] ?? null]));
	const verdict = (i: number, learned: LearnedLimits | null): Verdict => {
		const context = contexts[i];
		if (context === undefined) throw new RangeError(`no start ${i}`);
		const seen = evidence[i] ?? null;
		const alarm = alarmFor(context);
		const mayInfer =
			learned !== null &&
			seen !== null &&
			alarm === null &&
			scheduled[i] !== true &&
			mayLackRecord(circuit, context.stop, activations);
		const inferred = mayInfer ? inferTrip(circuit, context.run, context.stop, seen, context.spacing, learned) : null;
		const one = { run: context.run, window: context.window, logTo: circuit.logTo, alarm, evidence: seen, inferred };
		const pastLimit = seen !== null && wasPastLimit(circuit, context.run, context.stop, context.spacing);
		return correctedVerdict(
			judge({
				...one,
				onSchedule: scheduled[i] === true,
				pastLimit,
				pumpsStopped: pumpsAt.get(context.observedAt) ?? null
			}),
			context.correction,
			context.stop
		);
	};
	const first = contexts.map((_, i) => verdict(i, null));
	const brackets = learnBrackets(contexts, first);
	const learned: LearnedLimits = {};
	for (const each of brackets) if (!each.inverted) learned[each.protection] = each.trippedAt;
	return { verdicts: contexts.map((_, i) => verdict(i, learned)), brackets };
}

/** Alarms by the start of the run they stopped, all runs considered, and the one the log ends at. */
function alarmsOf(circuit: Circuit, activations: readonly Activation[]): Map<number, Activation> {
	const ended = circuit.runs.filter((run) => run.endedAt !== null);
	const matched = matchAlarms(
		ended.map((run) => ({ at: run.endedAt ?? NaN, uncertainty: run.endUncertainty })),
		activations
	);
	const found = new Map<number, Activation>();
	ended.forEach((run, i) => {
		const alarm = matched[i];
		if (alarm !== null && alarm !== undefined) found.set(run.startedAt, alarm);
	});
	const last = circuit.runs.at(-1);
	if (last?.end !== 'log-end') return found;
	const spacing = lastSpacing(circuit);
	const atEnd = activations.find(
		(a) => a.at > last.lastOn - spacing && a.at <= last.lastOn + 120_000 && a.at > last.startedAt
	);
	if (atEnd !== undefined) found.set(last.startedAt, atEnd);
	return found;
}

/** The last spacing of the running readings, ms. */
function lastSpacing(circuit: Circuit): number {
	const { t } = circuit.running;
	return (t.at(-1) ?? 0) - (t.at(-2) ?? 0);
}

/**
 * May a trip at this stop have gone unrecorded? Not where an alarm column works and reads clear: it has shown an
 * activation elsewhere and no text stands at the stop.
 */
function mayLackRecord(circuit: Circuit, stop: number, activations: readonly Activation[]): boolean {
	if (!activations.some((a) => a.source === 'column')) return true;
	return latchedAt(circuit.input.texts.alarm, stop) !== false;
}

function scheduleMarks(circuit: Circuit, contexts: readonly FigureContext[]): boolean[] {
	const stops = contexts.map((c) => ({ at: c.stop, long: c.stopped && c.seconds >= c.window }));
	return onSchedule(stops, siteClock(circuit.input.timeZone));
}
