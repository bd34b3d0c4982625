import type { FigureKey } from '$lib/model/start';
import { median } from '../series/numbers';
import { localSpacing } from '../series/spacing';
import { lastReading, readingsWithin } from '../series/window';
import { absence, labelOf, missing, put, type Absence, type FigureContext, type Figures, type TraceId } from './sheet';

/** A rest of this many seconds is long enough for oil to show what it has taken up (method.md). */
const LIFT_REST = 1800;

/**
 * oilTempAtStart, waterOutAtStart (°C), oilLiftAtStart (oil − evaporator saturation, K, only after 30 min of rest or
 * more): the last sample before the start, no older than a gap would be.
 */
export function readBeforeStart(context: FigureContext, sheet: Figures): void {
	const oil = lastBefore(context, 'oilTemp');
	put(sheet, 'oilTempAtStart', oil);
	put(sheet, 'waterOutAtStart', lastBefore(context, 'evapWaterOut'));
	put(sheet, 'oilLiftAtStart', oilLift(context, oil));
}

function oilLift(context: FigureContext, oil: number | Absence): number | Absence {
	if (context.restSeconds === null) return absence('no-rest', 'Nothing is known of the rest before this start.');
	if (context.restSeconds < LIFT_REST) return absence('does-not-apply', 'The rest before was under 30 min.');
	const saturation = lastBefore(context, 'evapSaturation');
	if (typeof oil !== 'number') return oil;
	return typeof saturation === 'number' ? oil - saturation : saturation;
}

function lastBefore(context: FigureContext, id: TraceId): number | Absence {
	const series = context.circuit.trace(id);
	if (series === undefined) return missing(context, id);
	const spacing = localSpacing(series, context.startedAt - 1) ?? 0;
	const reading = lastReading(series, context.startedAt - 1, Math.max(3 * spacing, 60, context.run.startUncertainty));
	return reading?.value ?? absence('gap', `The log has no ${labelOf(id)} just before the start.`);
}

/** condWaterInAtStart, outdoorAtStart (°C): the median of −60 to +60 s around the start. */
export function readAroundStart(context: FigureContext, sheet: Figures): void {
	around(context, sheet, 'condWaterInAtStart', 'condWaterIn');
	around(context, sheet, 'outdoorAtStart', 'outdoorTemp');
}

function around(context: FigureContext, sheet: Figures, key: FigureKey, id: TraceId): void {
	if (id === 'condWaterIn' && context.circuit.input.nature.condenser === 'air') {
		return put(sheet, key, absence('does-not-apply', 'The condenser is air-cooled.'));
	}
	const series = context.circuit.trace(id);
	if (series === undefined) return put(sheet, key, missing(context, id));
	const found = readingsWithin(series, context.startedAt - 60_000, context.startedAt + 60_000);
	put(sheet, key, median(found.v) ?? absence('gap', `The log has no ${labelOf(id)} within a minute of the start.`));
}
