import { METHOD_VERSION, type CircuitAnalysis, type CircuitInput } from '$lib/model/circuit-input';
import type { Interval, TextSeries } from '$lib/model/series';
import type { StartRecord } from '$lib/model/start';
import { limitAt } from '$lib/model/unit';
import { prepareCircuit, type Circuit } from './circuit';
import { readFigures, type FigureSheet } from './figures/read-figures';
import { markPinnedQuantity } from './figures/pinned-quantity';
import { markSameLevel } from './figures/same-level';
import type { FigureContext } from './figures/sheet';
import { stageOf } from './figures/stages';
import { shownNature } from './nature-shown';
import { activationsOf, namesAnother, type Activation } from './outcomes/activations';
import type { Verdict } from './outcomes/judge';
import { proposeShift } from './outcomes/match';
import { judgeStarts } from './outcomes/verdicts';
import { speaksOfProtection } from './outcomes/words';
import { median } from './series/numbers';
import { firstAtOrAfter } from './series/search';
import { isGapBefore, spacingWithin } from './series/spacing';
import { correctedRun, correctionOf } from './starts/corrections';
import { episodesOf } from './starts/episodes';
import { edgeNotes, isAttended, othersRunningAt, readRest } from './starts/rests';
import { readRunning, type RunningReadings } from './starts/running';
import { findRuns, type Run } from './starts/runs';

const NO_TRIP = () => false;
const SAME_RUN = () => true;

/**
 * Every start of one circuit's log, with its outcome, figures and stall (method.md). Pure: the same input gives the
 * same result. Where no column can tell when it ran, there are no starts and a note says so.
 */
export function analyseCircuit(given: CircuitInput): CircuitAnalysis {
	const input = { ...given, nature: shownNature(given) };
	const running = readRunning(input.series, input.nature);
	if (running === null || running.t.length === 0) return nothing(input);
	const { activations, shift, notes } = alignedAlarms(input, running);
	const circuit = prepareCircuit(input, running, (off) =>
		activations.some((a) => a.at >= off.from - 30_000 && a.at <= off.to)
	);
	const contexts = circuit.runs.filter((run) => run.observed).map((run) => contextOf(circuit, run));
	const { verdicts, brackets } = judgeStarts(circuit, contexts, activations);
	const episodes = episodesOf(
		contexts.map((c) => ({ startedAt: c.startedAt, restSeconds: c.restSeconds, outlived: c.seconds >= c.window })),
		limitAt(input.limits, 'firstStartRest', Infinity)?.value ?? 21_600
	);
	const stage = stageOf(circuit);
	const starts = contexts.map((context, i) => {
		const verdict = verdicts[i];
		const episode = episodes[i];
		if (verdict === undefined || episode === undefined) throw new RangeError(`no verdict on start ${i}`);
		const plain = record(context, verdict);
		const before = contexts[i - 1];
		const tripBefore = episode.tryNumber > 1 && verdicts[i - 1]?.outcome === 'tripped' && before !== undefined;
		if (tripBefore && context.restSeconds !== null) {
			plain.notes.push(`Restarted ${Math.round(context.restSeconds / 60)} min after a trip.`);
		}
		return { ...plain, ...episode, ...readFigures(context, brackets, stage) };
	});
	markSameLevel(circuit, starts);
	markPinnedQuantity(circuit, starts);
	return {
		circuit: input.circuit,
		starts,
		covered: coveredBy(running),
		smallestEventSeconds: smallestEvent(running),
		proposedAlarmShift: shift,
		brackets,
		notes: [...running.notes, ...circuit.saturations.notes, ...notes]
	};
}

function nothing(input: CircuitInput): CircuitAnalysis {
	return {
		circuit: input.circuit,
		starts: [],
		covered: [],
		smallestEventSeconds: null,
		proposedAlarmShift: null,
		brackets: [],
		notes: ['No column tells when the compressor ran: running, motor current, power, speed, capacity or start command.']
	};
}

/** Alarm activations on the log's clock, with the shift a person gave or the one that matches most. */
function alignedAlarms(input: CircuitInput, running: RunningReadings) {
	const rises: number[] = [];
	for (let i = 1; i < running.t.length; i++) {
		if (running.on[i] === 1 && running.on[i - 1] === 0) rises.push(running.t[i] ?? NaN);
	}
	const startedBetween = (from: number, to: number) => (rises[firstAtOrAfter(rises, from + 1)] ?? Infinity) <= to;
	const all = activationsOf(
		input.texts.alarm ?? alarmsOfMode(input),
		input.series.alarm,
		input.events,
		input.tripWords,
		startedBetween
	);
	const logged = all.filter((a) => !namesAnother(a.text, input.circuit));
	const given = input.alarmShiftSeconds ?? null;
	let shift: number | null = null;
	if (given === null && logged.some((a) => a.source === 'history')) {
		const runs = findRuns(running, { sameRunAcross: SAME_RUN, tripRecordedIn: NO_TRIP });
		const stops = runs.flatMap((r) => (r.endedAt === null ? [] : [{ at: r.endedAt, uncertainty: r.endUncertainty }]));
		shift = proposeShift(stops, logged);
	}
	const applied = (given ?? shift ?? 0) * 1000;
	const activations: Activation[] = logged
		.map((a) => (a.source === 'history' ? { ...a, at: a.at + applied } : a))
		.sort((a, b) => a.at - b.at);
	const notes =
		shift === null
			? []
			: [`The alarm history's clock seems ${-shift} s ahead of the log's; a person has to confirm it.`];
	return { activations, shift, notes };
}

/** Where nothing else records alarms, a mode column that says "fault" or "alarm shutdown" does. */
function alarmsOfMode(input: CircuitInput): TextSeries | undefined {
	const mode = input.texts.unitMode;
	if (mode === undefined || input.series.alarm !== undefined || input.events.length > 0) return undefined;
	const text = mode.text.map((words) => (speaksOfProtection(words) ? words : ''));
	return text.some((words) => words !== '') ? { t: mode.t, text } : undefined;
}

/** The signals whose spacing tells how finely a start can be read. */
const TELLING = ['evapSaturation', 'capacity', 'motorCurrent', 'evapWaterOut', 'condSaturation', 'oilTemp'] as const;

function contextOf(circuit: Circuit, observed: Run): FigureContext {
	const { input } = circuit;
	const correction = correctionOf(input.corrections, input.circuit, observed.startedAt);
	const run = correctedRun(observed, correction);
	const seen = run.end === 'off' && run.endedAt !== null;
	const stop = seen && run.endedAt !== null ? run.endedAt : run.lastOn;
	const restSeconds = run.restFrom === null ? null : (run.startedAt - run.restFrom) / 1000;
	const near = TELLING.map((id) => circuit.trace(id))
		.map((s) =>
			s === undefined ? null : spacingWithin(s, run.startedAt - 300_000, Math.min(stop, run.startedAt + 300_000))
		)
		.filter((s) => s !== null);
	return {
		circuit,
		run,
		startedAt: run.startedAt,
		observedAt: observed.startedAt,
		correction,
		stop,
		stopped: seen,
		seconds: (stop - run.startedAt) / 1000,
		window: circuit.limit('startUpWindow', run.startedAt) ?? 1200,
		spacing: median(near) ?? run.startUncertainty,
		restSeconds
	};
}

type Plain = Omit<StartRecord, 'episode' | 'tryNumber' | 'notes' | keyof FigureSheet> & { notes: string[] };

function record(context: FigureContext, verdict: Verdict): Plain {
	const { run, circuit } = context;
	const { input } = circuit;
	const rest = readRest(input, run, circuit.limit('firstStartRest', run.startedAt) ?? 21_600);
	const { correction } = context;
	const trip = verdict.trip;
	const notes = edgeNotes(input, run);
	if (correction !== null) notes.push(`Corrected by a person: ${correction.reason}`);
	if (run.holes.length > 0)
		notes.push(`The log has ${run.holes.length} gap${run.holes.length > 1 ? 's' : ''} inside this run.`);
	return {
		circuit: input.circuit,
		startedAt: run.startedAt,
		endedAt: run.endedAt,
		uncertaintySeconds: run.startUncertainty,
		endUncertaintySeconds: run.endUncertainty,
		spacingSeconds: context.spacing,
		outcome: verdict.outcome,
		outcomeReason: verdict.reason,
		startupTrip: trip !== null && trip.at - run.startedAt <= context.window * 1000,
		...rest,
		othersRunning: othersRunningAt(input, run.startedAt),
		attended: correction?.attended ?? isAttended(input, run.startedAt),
		holes: run.holes,
		trip,
		runningFrom: circuit.running.source,
		notes,
		methodVersion: METHOD_VERSION
	};
}

/** Stretches without a gap in the readings that tell whether it ran. */
function coveredBy(running: RunningReadings): Interval[] {
	const { t } = running;
	const covered: Interval[] = [];
	let from = t[0] ?? 0;
	for (let i = 1; i < t.length; i++) {
		const gap = running.logging === 'change' ? running.interrupted[i] === 1 : isGapBefore(t, i);
		if (!gap) continue;
		covered.push({ from, to: t[i - 1] ?? from });
		from = t[i] ?? from;
	}
	covered.push({ from, to: t.at(-1) ?? from });
	return covered;
}

/** The median spacing, s: what is shorter can go unseen. A change-of-value log shows every change, to the second. */
function smallestEvent(running: RunningReadings): number | null {
	if (running.logging === 'change') return 1;
	return spacingWithin({ t: running.t, v: Float64Array.from(running.on), logging: 'interval' }, -Infinity, Infinity);
}
