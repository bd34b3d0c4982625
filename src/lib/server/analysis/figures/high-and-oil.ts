import type { FigureKey } from '$lib/model/start';
import { theilSen } from '../series/numbers';
import { extreme, nearestReading } from '../series/window';
import { localSpacing } from '../series/spacing';
import { absence, during, missing, put, shortRun, type FigureContext, type Figures, type TraceId } from './sheet';

/** minMargin, maxMargin (K): least and most from 60 s to the stop; from 10 s in a run under 90 s. */
export function readMargin(context: FigureContext, sheet: Figures): void {
	const from = context.stopped && context.seconds < 90 ? 10 : 60;
	const found = during(context, 'margin', from, Infinity);
	put(sheet, 'minMargin', 'v' in found ? (extreme(found, 1)?.value ?? NaN) : found);
	put(sheet, 'maxMargin', 'v' in found ? (extreme(found, -1)?.value ?? NaN) : found);
}

/** Readings of a slope must span this many seconds of its 5–20 min. */
const SLOPE_SPAN = 300;

/** marginSlope, oilTempSlope (K/h): Theil–Sen over 5–20 min, readings spanning 5 min at least. */
export function readOilSlopes(context: FigureContext, sheet: Figures): void {
	for (const [key, id] of [
		['marginSlope', 'margin'],
		['oilTempSlope', 'oilTemp']
	] as const) {
		const found = during(context, id, 300, 1200, 2);
		if (!('v' in found)) {
			put(sheet, key, found);
			continue;
		}
		const hours = found.t.map((t) => (t - context.startedAt) / 3_600_000);
		const span = ((hours.at(-1) ?? 0) - (hours[0] ?? 0)) * 3600;
		put(sheet, key, span < SLOPE_SPAN ? shortRun(context, 300) : (theilSen(hours, found.v) ?? NaN));
	}
}

/** maxOilTemp, maxCondSaturation (°C): the most from start to stop. */
export function readMosts(context: FigureContext, sheet: Figures): void {
	for (const [key, id] of [
		['maxOilTemp', 'oilTemp'],
		['maxCondSaturation', 'condSaturation']
	] as const) {
		const found = during(context, id, 0, Infinity);
		put(sheet, key, 'v' in found ? (extreme(found, -1)?.value ?? NaN) : found);
	}
}

/** systemDeltaAt30s, systemDeltaAt60s (kPa), liftAtStart (K, at 60 s): the reading nearest that instant, within one spacing. */
export function readInstants(context: FigureContext, sheet: Figures): void {
	readAt(context, sheet, 'systemDeltaAt30s', 'systemDelta', 30);
	readAt(context, sheet, 'systemDeltaAt60s', 'systemDelta', 60);
	readAt(context, sheet, 'liftAtStart', 'lift', 60);
}

function readAt(context: FigureContext, sheet: Figures, key: FigureKey, id: TraceId, at: number): void {
	const series = context.circuit.trace(id);
	if (series === undefined) return put(sheet, key, missing(context, id));
	const instant = context.startedAt + at * 1000;
	if (context.run.lastOn < instant && context.seconds < at) return put(sheet, key, shortRun(context, at));
	const spacing = localSpacing(series, instant) ?? context.spacing;
	const near = nearestReading(series, instant, spacing);
	// Before the start, or after the stop, the reading belongs to the rest.
	if (near !== null && near.at >= context.startedAt && near.at <= context.run.lastOn) {
		if (spacing <= 60 || near.at !== context.startedAt) return put(sheet, key, near.value);
		const detail = `Sampled every ${Math.round(spacing)} s: nothing was read near ${at} s.`;
		return put(sheet, key, absence('too-coarse', detail));
	}
	put(
		sheet,
		key,
		near === null ? absence('gap', `Nothing was read within one spacing of ${at} s.`) : shortRun(context, at)
	);
}

/** minOilNet (kPa): the least net oil pressure from 30 s to the stop. */
export function readOilNet(context: FigureContext, sheet: Figures): void {
	const found = during(context, 'oilNet', 30, Infinity);
	put(sheet, 'minOilNet', 'v' in found ? (extreme(found, 1)?.value ?? NaN) : found);
}
