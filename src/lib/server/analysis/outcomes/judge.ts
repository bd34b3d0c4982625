import type { Outcome, Trip } from '$lib/model/start';
import type { Run } from '../starts/runs';
import type { Activation } from './activations';
import type { StopEvidence } from './evidence';

/** What is known of one run when its outcome is told. */
export type Case = {
	run: Run;
	/** The start-up window in force, s. */
	window: number;
	logTo: number;
	alarm: Activation | null;
	/** null when the stop was not seen. */
	evidence: StopEvidence | null;
	inferred: Trip | null;
	onSchedule: boolean;
	/** The pumps stopped in the row of the stop although they usually run on; null when that cannot be told. */
	pumpsStopped: boolean | null;
	/** A protective quantity was past its configured limit at the stop. */
	pastLimit: boolean;
};

export type Verdict = { outcome: Outcome; trip: Trip | null; reason: string };

/** Kinds that a supply that fails also raises. */
const SUPPLY_KINDS: ReadonlySet<string> = new Set([
	'phase-or-supply',
	'unknown',
	'sensor-or-communication',
	'starter-fault'
]);

/**
 * The outcome of a start, recorded evidence before inferred (method.md, starts and outcomes). A run that outlived the
 * window and ends without evidence of a trip is held, whatever hides its end; power failure is never a trip.
 */
export function judge(one: Case): Verdict {
	const { run, alarm, evidence } = one;
	if (alarm?.power) return powerFailed('The log names a power failure.');
	if (supplyWent(one) && (alarm === null || SUPPLY_KINDS.has(alarm.kind))) {
		return powerFailed('All that ran stopped at the same moment.');
	}
	if (alarm !== null && !pumpFollowed(one, alarm)) return recorded(alarm, run);
	const lasted = ((run.endedAt ?? one.logTo) - run.startedAt) / 1000;
	const seen = run.end === 'gap-off' || run.end === 'gap-on' ? (run.lastOn - run.startedAt) / 1000 : lasted;
	if (run.end === 'log-end') {
		if (seen >= one.window) return told('held', 'It still ran at the end of the log.');
		return told('lost', 'The log ends before it can be told.');
	}
	if (run.end !== 'off') {
		if (seen >= one.window) return told('held', 'It outlived the start-up window; a gap hides how it ended.');
		return told('lost', 'The log has a gap before it can be told.');
	}
	if (one.inferred !== null) return { outcome: 'tripped', trip: one.inferred, reason: one.inferred.reason };
	const normal = normalStop(one);
	if (lasted >= one.window) {
		return told('held', normal ?? 'It outlived the start-up window and nothing shows a trip.');
	}
	if (normal !== null && one.pastLimit && evidence?.commandFellAt === null) {
		return told('unclear', 'It stopped as if normally, but a protective quantity was past its limit.');
	}
	if (normal !== null) return told('called-off', normal);
	return told('unclear', 'It stopped inside the start-up window and the log cannot say why.');
}

function told(outcome: Outcome, reason: string): Verdict {
	return { outcome, trip: null, reason };
}

function powerFailed(reason: string): Verdict {
	return told('lost', `Power failed. ${reason}`);
}

/**
 * A flow alarm well after a stop that was commanded before it: the pump followed the compressor off, which stops nothing.
 */
function pumpFollowed({ run, evidence }: Case, alarm: Activation): boolean {
	if (alarm.kind !== 'loss-of-water-flow' || run.endedAt === null) return false;
	const commanded = evidence?.commandFellAt ?? null;
	const after = alarm.at - run.endedAt > 1000 * Math.max(15, run.endUncertainty, alarm.period);
	return after && commanded !== null && commanded <= run.lastOn;
}

/** Stops known no better than this, s, are not known to be of one moment [ours]. */
const SAME_MOMENT = 120;

/**
 * Did the supply go: other units too, or the pumps that usually run on, stopped in the same moment, with nothing of a
 * normal stop before it? A command that falls in the stop's own row may have gone with the supply.
 */
function supplyWent(one: Case): boolean {
	const { evidence, run } = one;
	if (evidence === null || evidence.unloaded === true || evidence.valveClosed || one.onSchedule) return false;
	if (evidence.commandFellAt !== null && evidence.commandFellAt <= run.lastOn) return false;
	// Rows minutes apart cannot show that all stopped in one moment.
	if (run.endUncertainty > SAME_MOMENT) return false;
	if (one.pumpsStopped === false) return false;
	return one.pumpsStopped === true || (evidence.allStopped && evidence.commandFellAt === null);
}

/** Why a stop is normal, as a sentence, or null. */
export function normalStop(one: Pick<Case, 'evidence' | 'onSchedule'>): string | null {
	const { evidence } = one;
	if (evidence === null) return null;
	if (evidence.commandFellAt !== null) return 'The run command fell before it stopped.';
	if (evidence.unloaded === true) return 'It unloaded toward its minimum before it stopped.';
	if (evidence.valveClosed) return 'The valve closed before it stopped.';
	if (evidence.setpointMet === true) return 'The leaving water had come down to its setpoint.';
	if (one.onSchedule) return 'It stopped at the clock time at which it stops on other days.';
	return null;
}

function recorded(alarm: Activation, run: Run): Verdict {
	const stop = run.endedAt;
	const away = stop === null ? null : Math.round((alarm.at - stop) / 1000);
	const where = alarm.source === 'column' ? 'alarm column' : 'alarm history';
	const reason =
		away === null
			? `The log ends at the trip: its ${where} holds "${alarm.text}" in the last spacing.`
			: `The ${where} holds "${alarm.text}" ${Math.abs(away)} s ${away < 0 ? 'before' : 'after'} the stop.`;
	const trip: Trip = { at: alarm.at, kind: alarm.kind, basis: 'recorded', text: alarm.text, sureness: 1, reason };
	return { outcome: 'tripped', trip, reason };
}
