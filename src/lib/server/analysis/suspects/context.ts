import type { ChangeFact, FieldCheckFact } from '$lib/model/checks';
import type { CircuitInput } from '$lib/model/circuit-input';
import type { FigureKey, StartRecord } from '$lib/model/start';
import { limitAt, type LimitKey, type UnitNature } from '$lib/model/unit';
import type { Series } from '$lib/model/series';
import { saturationPressure, saturationTemperature } from '../refrigerants/saturation';
import { mapDistinct } from '../series/map-distinct';
import { saturationsOf } from '../series/derived';
import { shownNature } from '../nature-shown';
import { median } from '../statistics/median';
import { medianAbsoluteDeviation } from '../statistics/median-absolute-deviation';
import { freezePoint } from '../water/properties';
import { type Words, wordsFor } from '../wording/quantity-words';
import { FIGURE_SIGNALS, stuckFinder } from './stuck-signals';
import { speaksAbout, isTellingTrip, presentStarts, type SuspectEvidence } from './evidence';
import { type Readable, traceReader, type TraceReader } from './trace-reader';

/** A value read from several starts. */
export type Reading = { value: number; starts: StartRecord[]; values: number[] };
/** A reading of the tripped starts beside the same window of the held ones. */
export type Beside = Reading & {
	/** Median of the held starts over the same elapsed window; null without any. */
	held: number | null;
	/** How far the median lies from that of the held starts. */
	shift: number | null;
	/** Held starts the band comes from, and 3 MAD of them. */
	heldCount: number;
	spread: number;
};

export type Context = {
	input: CircuitInput;
	nature: UnitNature;
	reader: TraceReader;
	words: Words;
	/** Eligible starts of the present state. */
	starts: StartRecord[];
	/** Those that tripped (start-up trips first choice), or are looked at alone for one start's clues. */
	bad: StartRecord[];
	held: StartRecord[];
	/** Starts that stalled for certain, and those whose limits are not logged. */
	stalls: StartRecord[];
	maybeStalls: StartRecord[];
	checks: readonly FieldCheckFact[];
	changes: readonly ChangeFact[];
	limit: (key: LimitKey) => number | null;
	/** Median of a figure over starts, of those that have it. */
	figure: (key: FigureKey, of: readonly StartRecord[]) => Reading | null;
	/** As `figure`, scaled to full load by the settled capacity (a share under 0.35 is too light to scale). */
	atFullLoad: (key: FigureKey, of: readonly StartRecord[]) => Reading | null;
	/** Median over starts of whatever is read from each. */
	gather: (of: readonly StartRecord[], read: (start: StartRecord) => number | null) => Reading | null;
	/** Median of a trace over from…to seconds from the start (never past 0.5 s before the stop). */
	window: (trace: Readable, from: number, to: number, of: readonly StartRecord[]) => Reading | null;
	/** The trip minute of the tripped starts beside the same elapsed time of the held ones. */
	tripMinute: (trace: Readable, earliest?: number) => Beside | null;
	/** A fixed window of the tripped starts beside the same of the held ones. */
	beside: (trace: Readable, from: number, to: number) => Beside | null;
	/** Saturation of the logged pressure minus the logged saturation, over from…to seconds from the start. */
	pressureGap: (of: readonly StartRecord[], from: number, to: number) => Reading | null;
};

const runSeconds = (start: StartRecord) =>
	start.endedAt === null ? Infinity : (start.endedAt - start.startedAt) / 1000;

function gather(starts: readonly StartRecord[], read: (start: StartRecord) => number | null): Reading | null {
	const found = starts.map((start) => ({ start, value: read(start) }));
	const kept = found.filter((one): one is { start: StartRecord; value: number } => one.value !== null);
	const values = kept.map((one) => one.value);
	const value = median(values);
	return value === null ? null : { value, values, starts: kept.map((one) => one.start) };
}

/** The trip minute of a start, seconds from its start: the last quarter of the run, 15 s at least, 60 s at most. */
function tripWindow(start: StartRecord): { from: number; to: number } {
	const stop = runSeconds(start);
	const length = Math.min(60, Math.max(15, 2.2 * start.spacingSeconds, stop / 4));
	return { from: Math.max(0, stop - length), to: stop - 0.5 };
}

/** How many held starts are read beside the tripped ones; the nearest in time serve best. */
const HELD_BESIDE = 40;

function windowOf(reader: TraceReader, trace: Readable, start: StartRecord, from: number, to: number): number | null {
	const last = Math.min(to, runSeconds(start) - 0.5);
	if (last < from) return null;
	return reader.median(trace, start.startedAt + from * 1000, start.startedAt + last * 1000);
}

/** A saturation that was worked out from the pressure is no second reading beside it. */
function pressureGap(input: CircuitInput, reader: TraceReader, start: StartRecord, from: number, to: number) {
	if (!input.series.evapSaturation?.t.length) return null;
	const pressure = windowOf(reader, 'evapPressure', start, from, to);
	const logged = windowOf(reader, 'evapSaturation', start, from, to);
	if (pressure === null || logged === null) return null;
	const saturation = saturationTemperature(input.refrigerant, pressure);
	return saturation === null ? null : saturation - logged;
}

function besideOf(bad: Reading | null, heldValues: number[]): Beside | null {
	if (!bad) return null;
	const held = median(heldValues);
	return {
		...bad,
		held,
		shift: held === null ? null : bad.value - held,
		heldCount: heldValues.length,
		spread: 3 * (medianAbsoluteDeviation(heldValues) ?? 0)
	};
}

/** The circuit's series with saturations worked out where the log has only pressures. */
function withSaturations(input: CircuitInput): CircuitInput['series'] {
	const { evap, cond } = saturationsOf(input.series, input.refrigerant);
	return {
		...input.series,
		...(evap ? { evapSaturation: evap } : {}),
		...(cond ? { condSaturation: cond } : {})
	};
}

/** Pressures worked out from logged saturations where the log has no pressures: for differences of pressure only. */
function pressuresOf(input: CircuitInput): Partial<Record<'evapPressure' | 'condPressure', Series>> {
	const from = (pressure: Series | undefined, saturation: Series | undefined): Series | undefined => {
		if (pressure?.t.length || !saturation?.t.length) return undefined;
		return {
			...saturation,
			v: mapDistinct(saturation.v, (value) => saturationPressure(input.refrigerant, value) ?? NaN)
		};
	};
	const { evapPressure, evapSaturation, condPressure, condSaturation } = input.series;
	const [evap, cond] = [from(evapPressure, evapSaturation), from(condPressure, condSaturation)];
	return { ...(evap ? { evapPressure: evap } : {}), ...(cond ? { condPressure: cond } : {}) };
}

/** A first row that may come minutes after the start shows a loaded machine, not how it started. */
const isTooCoarse = (start: StartRecord, key: FigureKey) => start.marks[key] === 'coarse' && start.spacingSeconds > 60;

function fullLoad(value: number | null, capacity: number | null): number | null {
	if (value === null || capacity === null) return value;
	return capacity < 35 ? null : value / (Math.min(100, capacity) / 100);
}

/** Settled superheat from which an evaporator that nobody described is direct expansion, K: common practice, no source. */
const DRY_FROM = 3.5;

/** The nature as given or shown by the columns; an evaporator whose runs settle dry is taken for direct expansion. */
function settledNature(input: CircuitInput, starts: readonly StartRecord[]): CircuitInput['nature'] {
	const shown = shownNature(input);
	if (shown.evaporator) return shown;
	const superheat = median(starts.map((start) => start.figures.superheat ?? NaN));
	return superheat !== null && superheat >= DRY_FROM ? { ...shown, evaporator: 'dx' } : shown;
}

/** What the clues are read from, over given tripped and held starts. */
export function contextOf(
	evidence: SuspectEvidence,
	starts: StartRecord[],
	bad: StartRecord[],
	held: StartRecord[]
): Context {
	const input = { ...evidence.input, nature: settledNature(evidence.input, starts) };
	const reader = traceReader(withSaturations(input), pressuresOf(input));
	const lastStart = starts.at(-1)?.startedAt ?? Infinity;
	const beside = held.slice(-HELD_BESIDE);
	const stuck = stuckFinder(reader);
	const trusted = (start: StartRecord, key: FigureKey) =>
		isTooCoarse(start, key) || (FIGURE_SIGNALS[key] ?? []).some((signal) => stuck(signal, start))
			? null
			: start.figures[key];
	return {
		input,
		nature: input.nature,
		reader,
		words: wordsFor(evidence.units ?? 'si'),
		starts,
		bad,
		held,
		stalls: starts.filter((start) => start.stall?.verdict === 'stall'),
		maybeStalls: starts.filter((start) => start.stall?.verdict === 'cannot-tell'),
		checks: evidence.checks ?? [],
		changes: evidence.changes ?? [],
		limit: (key) => limitAt(input.limits, key, lastStart)?.value ?? null,
		figure: (key, of) => gather(of, (start) => trusted(start, key)),
		atFullLoad: (key, of) => gather(of, (start) => fullLoad(trusted(start, key), start.figures.settledCapacity)),
		gather,
		window: (trace, from, to, of) => gather(of, (start) => windowOf(reader, trace, start, from, to)),
		tripMinute: (trace, earliest = 10) => {
			const windows = bad.map((start) => ({ start, ...tripWindow(start) })).filter(({ to }) => to >= earliest);
			const read = gather(
				windows.map(({ start }) => start),
				(start) => {
					const window = tripWindow(start);
					return windowOf(reader, trace, start, Math.max(window.from, Math.min(earliest, window.to - 1)), window.to);
				}
			);
			const from = median(windows.map((window) => window.from));
			const to = median(windows.map((window) => window.to));
			if (from === null || to === null) return null;
			const others = gather(beside, (start) => windowOf(reader, trace, start, from, to));
			return besideOf(read, others?.values ?? []);
		},
		pressureGap: (of, from, to) => gather(of, (start) => pressureGap(input, reader, start, from, to)),
		beside: (trace, from, to) => {
			const others = gather(beside, (start) => windowOf(reader, trace, start, from, to));
			return besideOf(
				gather(bad, (start) => windowOf(reader, trace, start, from, to)),
				others?.values ?? []
			);
		}
	};
}

/** A stop whose kind nobody recorded says nothing of the low side unless saturation was low, K over its cut-out [ours]. */
const LOW_BY = 4;

const isUntold = (start: StartRecord) => (start.trip?.kind ?? 'unknown') === 'unknown';

function wentLow(start: StartRecord, context: Context): boolean {
	const stop = start.endedAt ?? start.startedAt;
	const readings = context.reader.values(
		'evapSaturation',
		stop - Math.max(60, 2.2 * start.spacingSeconds) * 1000,
		stop
	);
	if (readings.length === 0) return true;
	const freezes = freezePoint(context.nature.evapFluid ?? undefined);
	return Math.min(...readings) <= (context.limit('evapSaturationCutout') ?? freezes) + LOW_BY;
}

/** The same context with only the trips that speak about one side of the machine. */
export function sideContext(evidence: SuspectEvidence, context: Context, side: 'low-side' | 'head'): Context {
	const bad = context.bad.filter(
		(start) => speaksAbout(start, side) && (side === 'head' || !isUntold(start) || wentLow(start, context))
	);
	return bad.length === context.bad.length ? context : contextOf(evidence, context.starts, bad, context.held);
}

/** Without a single trip, two stops or more that the log cannot explain within this many seconds are looked at. */
const UNCLEAR_WITHIN = 1200;

/** Start-up trips tell more than later ones; when they are fewer than this share, all trips are looked at [ours]. */
const START_UP_SHARE = 1 / 3;

/** The context of a whole period: its tripped starts beside its held ones. */
export function periodContext(evidence: SuspectEvidence): Context {
	const starts = presentStarts(evidence);
	const tripped = starts.filter(isTellingTrip);
	const startUp = tripped.filter((start) => start.startupTrip);
	const unclear = starts.filter((start) => start.outcome === 'unclear' && runSeconds(start) < UNCLEAR_WITHIN);
	const held = starts.filter((start) => start.outcome === 'held');
	const tell = startUp.length >= START_UP_SHARE * tripped.length ? startUp : tripped;
	const bad = tell.length > 0 ? tell : unclear.length > 1 ? unclear : [];
	return contextOf(evidence, starts, bad, held);
}
