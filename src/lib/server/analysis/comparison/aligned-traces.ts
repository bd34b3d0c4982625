import type { CircuitInput } from '$lib/model/circuit-input';
import type { Quantity } from '$lib/model/quantities';
import { DERIVED, type Family, SIGNALS, type TraceKey } from '$lib/model/signals';
import type { StartRecord } from '$lib/model/start';
import { saturationsOf } from '../series/derived';
import { finite } from '../statistics/finite';
import { median } from '../statistics/median';
import { quantile } from '../statistics/quantile';
import { type Readable, traceReader, type TraceReader } from '../suspects/trace-reader';

/** The traces that are laid over each other, in the order of the start sheet's strips. */
export const ALIGNED: readonly Exclude<Readable, `${string}.${number}`>[] = [
	'capacity',
	'demand',
	'evapSaturation',
	'evapWaterOut',
	'evapApproach',
	'superheat',
	'valvePosition',
	'condSaturation',
	'lift',
	'systemDelta',
	'dischargeSuperheat',
	'oilTemp',
	'margin',
	'oilNet',
	'motorCurrent',
	'evapFlow'
];
/** Landmarks, s from the start. */
export const LANDMARKS = [30, 45, 60, 90, 120] as const;
/** Water probes lag pressures by 20–60 s: no water temperature before two minutes. */
const WATER_FROM = 120;
/** Envelopes end here at the latest, s, in so many steps. */
const ENVELOPE_SECONDS = 1200;
const ENVELOPE_STEPS = 120;
/** A group's envelope ends where fewer than this share of it still run. */
const WHOLE = 0.8;
/** Nearest starts read of a long group: enough for quartiles, few enough for a page. */
const MOST_STARTS = 60;

export function infoOf(trace: TraceKey): { label: string; quantity: Quantity; family: Family } {
	return trace in DERIVED ? DERIVED[trace as keyof typeof DERIVED] : SIGNALS[trace as keyof typeof SIGNALS];
}

export type EnvelopeSide = {
	count: number;
	t: number[];
	median: (number | null)[];
	low: (number | null)[];
	high: (number | null)[];
	wholeUntil: number | null;
};
export type Envelope = {
	signal: TraceKey;
	label: string;
	quantity: Quantity;
	family: Family;
	a: EnvelopeSide;
	b: EnvelopeSide;
};
export type Landmark = {
	seconds: number;
	countA: number;
	countB: number;
	rows: {
		signal: TraceKey;
		label: string;
		quantity: Quantity;
		described: boolean;
		a: number | null;
		b: number | null;
	}[];
};

/** Reader of a circuit with saturations worked out where the log has only pressures. */
export function readerOf(input: CircuitInput): TraceReader {
	const { evap, cond } = saturationsOf(input.series, input.refrigerant);
	return traceReader({
		...input.series,
		...(evap ? { evapSaturation: evap } : {}),
		...(cond ? { condSaturation: cond } : {})
	});
}

const runsAt = (start: StartRecord, seconds: number) =>
	start.endedAt === null || start.endedAt > start.startedAt + seconds * 1000;

function valueAt(reader: TraceReader, trace: Readable, start: StartRecord, seconds: number): number {
	if (!runsAt(start, seconds)) return NaN;
	return reader.last(trace, start.startedAt + seconds * 1000, 1500 * Math.max(1, start.spacingSeconds)) ?? NaN;
}

function sideOf(reader: TraceReader, trace: Readable, starts: readonly StartRecord[], step: number): EnvelopeSide {
	const side: EnvelopeSide = { count: starts.length, t: [], median: [], low: [], high: [], wholeUntil: null };
	for (let seconds = 0; seconds <= ENVELOPE_SECONDS; seconds += step) {
		const running = starts.filter((start) => runsAt(start, seconds));
		if (running.length < WHOLE * starts.length || starts.length === 0) {
			side.wholeUntil = Math.max(0, seconds - step);
			break;
		}
		const values = finite(running.map((start) => valueAt(reader, trace, start, seconds)));
		// Quartiles of fewer than half of the group would be another group's.
		const enough = values.length >= Math.max(1, starts.length / 2);
		side.t.push(seconds);
		side.median.push(enough ? median(values) : null);
		side.low.push(enough ? quantile(values, 0.25) : null);
		side.high.push(enough ? quantile(values, 0.75) : null);
	}
	return side;
}

/** Median and quartile bands of both groups, aligned at the start; a trace neither group has is left out. */
export function envelopesOf(reader: TraceReader, a: readonly StartRecord[], b: readonly StartRecord[]): Envelope[] {
	const spacing = median([...a, ...b].map((start) => start.spacingSeconds)) ?? 10;
	const step = Math.max(ENVELOPE_SECONDS / ENVELOPE_STEPS, spacing);
	return ALIGNED.filter((trace) => reader.has(trace)).map((trace) => ({
		signal: trace,
		...pick(infoOf(trace)),
		a: sideOf(reader, trace, a.slice(-MOST_STARTS), step),
		b: sideOf(reader, trace, b.slice(-MOST_STARTS), step)
	}));
}

function pick({ label, quantity, family }: ReturnType<typeof infoOf>) {
	return { label, quantity, family };
}

/** Medians at the landmarks, among the starts of each group that still run then. Nothing is tested here. */
export function landmarksOf(
	reader: TraceReader,
	a: readonly StartRecord[],
	b: readonly StartRecord[],
	described: ReadonlySet<TraceKey>
): Landmark[] {
	return LANDMARKS.map((seconds) => {
		const [x, y] = [a, b].map((list) => list.slice(-MOST_STARTS).filter((start) => runsAt(start, seconds)));
		const rows = ALIGNED.filter(
			(trace) => reader.has(trace) && (seconds >= WATER_FROM || !['evapWaterOut', 'evapApproach'].includes(trace))
		).map((trace) => {
			const { label, quantity } = infoOf(trace);
			const middle = (list: readonly StartRecord[] | undefined) =>
				median((list ?? []).map((start) => valueAt(reader, trace, start, seconds)));
			return { signal: trace, label, quantity, described: described.has(trace), a: middle(x), b: middle(y) };
		});
		return {
			seconds,
			countA: x?.length ?? 0,
			countB: y?.length ?? 0,
			rows: rows.filter((row) => row.a !== null || row.b !== null)
		};
	});
}
