import type { FigureKey } from '$lib/model/start';
import { median } from '../series/numbers';
import { extreme, readingsWithin } from '../series/window';
import { absence, during, missing, put, shortRun, type FigureContext, type Figures, type TraceId } from './sheet';

const WINDOW_FROM = 45;
const WINDOW_TO = 120;

/**
 * startCapacity (%), startAmps (A or % of rated): the median of 45–120 s after the start, two samples at least. A run
 * shorter than that: 10 s to its stop, marked `early`. Where the spacing is too coarse for two samples: the
 * first row, marked `coarse`. Amps never count before the starter's transition + 10 s (unknown: 45 s).
 */
export function readStartLoading(context: FigureContext, sheet: Figures): void {
	readAtStart(context, sheet, 'startCapacity', 'capacity', 0);
	const transition = context.circuit.input.nature.starterTransition;
	const earliest = transition === null || transition === undefined ? 45 : transition + 10;
	readAtStart(context, sheet, 'startAmps', 'motorCurrent', earliest);
}

function readAtStart(context: FigureContext, sheet: Figures, key: FigureKey, id: TraceId, earliest: number): void {
	const series = context.circuit.trace(id);
	if (series === undefined) return put(sheet, key, missing(context, id));
	const short = context.stopped && context.seconds < WINDOW_TO;
	const from = Math.max(earliest, short ? 10 : WINDOW_FROM);
	const found = during(context, id, from, short ? context.seconds : Math.max(WINDOW_TO, from), short ? 1 : 2);
	if ('v' in found) {
		put(sheet, key, median(found.v) ?? NaN);
		if (short) sheet.marks[key] = 'early';
		return;
	}
	// One row every 20 s or more cannot be expected to give two samples; the first row that may count is all there is.
	if (found.reason === 'gap' || (context.spacing < 20 && found.reason === 'run-too-short'))
		return put(sheet, key, found);
	if (context.spacing < 20) return put(sheet, key, shortRun(context, from));
	const first = readingsWithin(series, context.startedAt + earliest * 1000, context.run.lastOn);
	const value = first.v[0];
	if (value === undefined) return put(sheet, key, shortRun(context, earliest));
	put(sheet, key, value);
	sheet.marks[key] = 'coarse';
}

const STEPS = [
	['timeTo50Seconds', 50],
	['timeTo75Seconds', 75],
	['timeTo90Seconds', 90]
] as const;

/**
 * peakCapacity: the most from the start to 30 s before the stop (to the last row where the stop was not seen);
 * timeTo50/75/90/PeakSeconds: the first time, s from the start, at which capacity reached that much.
 */
export function readPeak(context: FigureContext, sheet: Figures): void {
	const keys: FigureKey[] = ['peakCapacity', 'timeToPeakSeconds', ...STEPS.map(([key]) => key)];
	const end = context.stopped ? context.seconds - 30 : context.seconds;
	const found = end < 0 ? shortRun(context, 30) : during(context, 'capacity', 0, end);
	if (!('v' in found)) {
		for (const key of keys) put(sheet, key, found);
		return;
	}
	const peak = extreme(found, -1);
	if (peak === null) return;
	const since = (at: number) => (at - context.startedAt) / 1000;
	put(sheet, 'peakCapacity', peak.value);
	put(sheet, 'timeToPeakSeconds', since(peak.at));
	for (const [key, level] of STEPS) {
		const i = found.v.findIndex((v) => v >= level);
		const at = found.t[i];
		if (at === undefined) put(sheet, key, absence('does-not-apply', `Capacity did not reach ${level} %.`));
		else put(sheet, key, since(at));
	}
}
