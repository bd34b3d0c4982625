import { METHOD_VERSION, type TripWord } from '$lib/model/circuit-input';
import type { NotedStartBody } from '$lib/model/noted';
import type { EventRecord, Interval } from '$lib/model/series';
import { FIGURE_KEYS, type FigureKey, type StartRecord, type StartSource, type Trip } from '$lib/model/start';
import { limitAt, type LimitHistory } from '$lib/model/unit';
import { readAlarm } from '../outcomes/words';
import { episodesOf } from '../starts/episodes';
import { runsOfHistory } from './history-runs';

/** What a record without a trend log is made from, one circuit at a time. */
export type NotedInput = {
	circuit: string;
	typed: readonly NotedStartBody[];
	events: readonly EventRecord[];
	tripWords: readonly TripWord[];
	/** stretches that a trend log covers: there the log tells, and nothing is taken from here */
	covered: readonly Interval[];
	/** stretches with a person at the unit */
	visits: readonly Interval[];
	limits: LimitHistory;
};

/** A start as its record tells it; ms UTC. */
type Known = {
	source: Exclude<StartSource, 'log'>;
	startedAt: number | null;
	endedAt: number | null;
	outcome: StartRecord['outcome'];
	trip: Trip | null;
	attended: boolean;
	reason: string;
};

/** A typed start and an alarm of the same stop stand this close, s [ours]. */
const SAME_STOP = 300;
const LAY_UP = 604_800;

const anchor = (known: Known): number => known.startedAt ?? known.endedAt ?? 0;

/** A trip kind a person chose, else what the trade-word table makes of the words, else `unknown`. */
function kindOf(body: NotedStartBody, own: readonly TripWord[]): Trip['kind'] {
	if (body.tripKind !== null) return body.tripKind;
	const meaning = body.text === '' ? null : readAlarm(body.text, own);
	return meaning?.is === 'trip' ? meaning.kind : 'unknown';
}

function ofTyping(body: NotedStartBody, own: readonly TripWord[]): Known {
	const at = body.endedAt ?? body.startedAt ?? 0;
	const reason = 'Typed in by a person; there is no trend log of it.';
	const trip: Trip = {
		at,
		kind: kindOf(body, own),
		basis: 'recorded',
		text: body.text === '' ? null : body.text,
		sureness: 1,
		reason
	};
	const { startedAt, endedAt, outcome, attended } = body;
	return { source: 'typed', startedAt, endedAt, outcome, attended, reason, trip: outcome === 'tripped' ? trip : null };
}

function ofHistory(input: NotedInput, window: number): Known[] {
	return runsOfHistory(input.events, input.circuit, input.tripWords).map(({ startedAt, endedAt, trip, stopText }) => {
		const common = { source: 'alarm-list' as const, startedAt, endedAt, attended: false };
		if (trip !== null) {
			const reason =
				startedAt === null
					? 'From an alarm list; when it started is not known.'
					: 'From an alarm list; there is no trend log of it.';
			const { at, kind, text } = trip;
			return {
				...common,
				outcome: 'tripped',
				reason,
				trip: { at, kind, basis: 'recorded', text, sureness: 1, reason }
			};
		}
		if (startedAt === null || endedAt === null) {
			return { ...common, outcome: 'lost', trip: null, reason: 'The event history does not say how it ended.' };
		}
		const held = (endedAt - startedAt) / 1000 >= window;
		return held
			? { ...common, outcome: 'held', trip: null, reason: `It ran past the start-up window (“${stopText ?? ''}”).` }
			: { ...common, outcome: 'unclear', trip: null, reason: 'The event history does not say why it stopped.' };
	});
}

const within = (spans: readonly Interval[], at: number): boolean =>
	spans.some((span) => at >= span.from && at <= span.to);

/** A typed start takes the words of the alarm that came at its stop; the alarm is not counted again. */
function joined(typed: readonly Known[], listed: readonly Known[]): Known[] {
	const used = new Set<Known>();
	const all = typed.map((known) => {
		const same = listed.find(
			(other) =>
				!used.has(other) &&
				Math.abs((other.endedAt ?? anchor(other)) - (known.endedAt ?? anchor(known))) <= SAME_STOP * 1000
		);
		if (same === undefined) return known;
		used.add(same);
		const text = known.trip?.text ?? same.trip?.text ?? null;
		const kind = known.trip?.kind === 'unknown' ? (same.trip?.kind ?? 'unknown') : known.trip?.kind;
		return {
			...known,
			startedAt: known.startedAt ?? same.startedAt,
			endedAt: known.endedAt ?? same.endedAt,
			trip: known.trip === null || kind === undefined ? known.trip : { ...known.trip, text, kind }
		};
	});
	return [...all, ...listed.filter((known) => !used.has(known))].sort((a, b) => anchor(a) - anchor(b));
}

const NO_FIGURES = Object.fromEntries(FIGURE_KEYS.map((key) => [key, null])) as Record<FigureKey, null>;
const ABSENT = Object.fromEntries(
	FIGURE_KEYS.map((key) => [key, { reason: 'signal-missing', detail: 'There is no trend log of this start.' }])
) as StartRecord['absent'];

/**
 * The record of one circuit's starts where no trend log covers them: typed ones, and those of alarm or event
 * histories. Every record carries its source; figures are absent. The rest before is told only by a history with start
 * and stop lines: between two typed starts there may be one that nobody wrote down. Pure.
 */
export function notedStarts(input: NotedInput): StartRecord[] {
	const windowAt = (at: number): number => limitAt(input.limits, 'startUpWindow', at)?.value ?? 1200;
	const typed = input.typed.map((body) => ofTyping(body, input.tripWords));
	const listed = ofHistory(input, windowAt(Infinity));
	const known = joined(typed, listed).filter((one) => !within(input.covered, anchor(one)));
	const rests = known.map((one, i) => {
		const before = known[i - 1]?.endedAt ?? null;
		const told = one.source === 'alarm-list' && one.startedAt !== null && before !== null;
		const seconds = told ? ((one.startedAt ?? 0) - before) / 1000 : null;
		return seconds !== null && seconds >= 0 ? seconds : null;
	});
	const ran = (one: Known): number | null =>
		one.startedAt === null || one.endedAt === null ? null : (one.endedAt - one.startedAt) / 1000;
	const longRest = limitAt(input.limits, 'firstStartRest', Infinity)?.value ?? 21_600;
	const tries = known.map((one, i) => ({
		startedAt: anchor(one),
		restSeconds: rests[i] ?? null,
		outlived: (ran(one) ?? 0) >= windowAt(anchor(one))
	}));
	const episodes = episodesOf(tries, longRest);
	return known.map((one, i) => {
		const restSeconds = rests[i] ?? null;
		const firstStart = restSeconds !== null && restSeconds >= longRest;
		return {
			...plain(input, one, ran(one), windowAt(anchor(one))),
			...episodes[i],
			restSeconds,
			firstStart,
			circuitFirst: firstStart,
			layUp: restSeconds !== null && restSeconds > LAY_UP
		};
	});
}

function plain(input: NotedInput, known: Known, ranSeconds: number | null, window: number): StartRecord {
	const at = anchor(known);
	// Typed to the minute; a history has the seconds of its own clock.
	const uncertainty = known.source === 'typed' ? 60 : 1;
	return {
		circuit: input.circuit,
		source: known.source,
		startedAt: at,
		endedAt: known.endedAt,
		uncertaintySeconds: uncertainty,
		endUncertaintySeconds: uncertainty,
		spacingSeconds: 0,
		outcome: known.outcome,
		outcomeReason: known.reason,
		startupTrip: known.outcome === 'tripped' && ranSeconds !== null && ranSeconds < window,
		firstStart: false,
		circuitFirst: false,
		unitFirst: false,
		othersRunning: 0,
		restSeconds: null,
		restAtLeast: false,
		layUp: false,
		episode: null,
		tryNumber: 1,
		attended: known.attended || within(input.visits, at),
		holes: [],
		trip: known.trip,
		stall: null,
		settled: null,
		runningFrom: 'record',
		notes: known.startedAt === null ? ['When it started is not known: the instant is that of the stop.'] : [],
		figures: NO_FIGURES,
		absent: ABSENT,
		marks: {},
		methodVersion: METHOD_VERSION
	};
}
