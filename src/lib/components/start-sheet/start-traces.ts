import {
	isMeasureKey,
	type MeasureKey,
	MEASURES,
	pageMeasure,
	QUANTITIES,
	type Quantity,
	type UnitSystem
} from '$lib/model/quantities';
import type { TraceKey } from '$lib/model/signals';
import { type BinaryTraces, TRACES_BINARY, unpackTraces } from '$lib/utils/traces-binary';

/** One trace of a start as the sheet holds it: ms UTC and stored units, NaN where there is no reading. */
export type StartTrace = {
	key: TraceKey;
	label: string;
	quantity: Quantity;
	/** Set when the stored unit is not the quantity's usual one (motor current as % of rated). */
	own: MeasureKey | null;
	hold: boolean;
	t: Float64Array;
	v: Float32Array;
};

export type Mark = { kind: 'start' | 'trip' | 'stop' | 'alarm' | 'change' | 'note'; at: number; text: string };

/** All traces of one start over one stretch of time. */
export type StartTraces = {
	startId: string;
	startMs: number;
	traces: ReadonlyMap<TraceKey, StartTrace>;
	gaps: readonly { from: number; to: number }[];
	marks: readonly Mark[];
	/** ms between the readings of the busiest trace */
	spacing: number;
	/** Instants of the busiest trace: where the cursor can stand. */
	stops: Float64Array;
};

/** A stretch around a start to fetch: seconds before and after it, and how many px it is reduced to. */
export type TraceLevel = { before: number; after: number; px: number };

function isQuantity(text: string): text is Quantity {
	return (QUANTITIES as readonly string[]).includes(text);
}

/** The unit of measure of a trace when it is not its quantity's usual one; answers name it by key or as printed. */
function ownMeasure(quantity: Quantity, measure: string): MeasureKey | null {
	const usual = pageMeasure(quantity, 'si');
	if (quantity !== 'current' || measure === usual) return null;
	if (isMeasureKey(measure)) return measure;
	return measure === MEASURES.pctRated.symbol ? 'pctRated' : null;
}

/**
 * Traces of an answer as the sheet holds them. Traces without a single reading are left out: they are missing.
 * @param startedAt ISO instant of the start
 */
export function holdTraces(startId: string, startedAt: string, answer: BinaryTraces): StartTraces {
	const traces = new Map<TraceKey, StartTrace>();
	let stops = new Float64Array();
	for (const { signal, label, quantity, measure, logging, t, v } of answer.traces) {
		if (!isQuantity(quantity) || !v.some((value) => !Number.isNaN(value))) continue;
		const key = signal as TraceKey;
		traces.set(key, { key, label, quantity, own: ownMeasure(quantity, measure), hold: logging === 'change', t, v });
		if (t.length > stops.length) stops = new Float64Array(t);
	}
	const steps = Array.from(stops.subarray(1), (at, k) => at - (stops[k] ?? 0)).sort((a, b) => a - b);
	return {
		startId,
		startMs: Date.parse(startedAt),
		traces,
		gaps: answer.gaps.map(({ from, to }) => ({ from: Date.parse(from), to: Date.parse(to) })),
		marks: answer.marks.map(({ kind, at, text }) => ({ kind, at: Date.parse(at), text })),
		spacing: answer.spacingSeconds !== null ? answer.spacingSeconds * 1000 : (steps[steps.length >> 1] ?? 1000),
		stops
	};
}

/** Unit of measure a trace is printed in: its own where it has one, else the person's. */
export function printedMeasure(trace: Pick<StartTrace, 'quantity' | 'own'>, system: UnitSystem): MeasureKey {
	return trace.own ?? pageMeasure(trace.quantity, system);
}

/**
 * Fetches the traces of one start in the compact form.
 * @throws Error with the server's own words when the answer is a refusal
 */
export async function fetchTraces(
	start: { id: string; startedAt: string },
	keys: readonly TraceKey[],
	level: TraceLevel,
	fetcher: typeof fetch = fetch
): Promise<StartTraces> {
	const query = new URLSearchParams({
		signals: keys.join(','),
		px: String(level.px),
		before: String(level.before),
		after: String(level.after)
	});
	const answer = await fetcher(`/api/starts/${start.id}/traces?${query}`, { headers: { accept: TRACES_BINARY } });
	if (!answer.ok) {
		const problem = (await answer.json().catch(() => null)) as { detail?: string; title?: string } | null;
		throw new Error(problem?.detail ?? problem?.title ?? `the server answered ${answer.status}`);
	}
	return holdTraces(start.id, start.startedAt, unpackTraces(await answer.arrayBuffer()));
}
