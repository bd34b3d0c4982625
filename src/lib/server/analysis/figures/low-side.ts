import { theilSen } from '../series/numbers';
import { spacingWithin } from '../series/spacing';
import { extreme, type Readings } from '../series/window';
import { absence, during, put, shortRun, type FigureContext, type Figures } from './sheet';

/** minEvapSaturation (°C) and when (s): the least from 5 s after the start to the stop. */
export function readLeastSaturation(context: FigureContext, sheet: Figures): void {
	const found = during(context, 'evapSaturation', 5, Infinity);
	const least = 'v' in found ? extreme(found, 1) : null;
	if (!('v' in found)) {
		put(sheet, 'minEvapSaturation', found);
		put(sheet, 'minEvapSaturationAtSeconds', found);
	} else if (least !== null) {
		put(sheet, 'minEvapSaturation', least.value);
		put(sheet, 'minEvapSaturationAtSeconds', (least.at - context.startedAt) / 1000);
	}
}

/** The steepest slope counts over stretches of 30 s, and of no less than half of that. */
const FALL_MOST = 30_000;
const FALL_LEAST = 15_000;

/**
 * steepestFall, K/min: the most negative slope of evaporator saturation over any 30 s of the start-up
 * window, two samples at least and no less than 15 s apart. A slope: a falling saturation gives a negative figure.
 */
export function readSteepestFall(context: FigureContext, sheet: Figures): void {
	const found = during(context, 'evapSaturation', 0, context.window, 2);
	if (!('v' in found)) return put(sheet, 'steepestFall', found);
	const steepest = steepestSlope(found);
	if (steepest !== null) return put(sheet, 'steepestFall', steepest);
	const spacing = spacingWithin(found.series, context.startedAt, context.run.lastOn) ?? context.spacing;
	if (spacing > 30) {
		const detail = `The log has evaporator saturation every ${Math.round(spacing)} s; a slope over 30 s needs two samples.`;
		return put(sheet, 'steepestFall', absence('too-coarse', detail));
	}
	put(sheet, 'steepestFall', shortRun(context, 15));
}

/** Most negative slope, K/min, between a reading and the last one within 30 s after it. null when no pair fits */
export function steepestSlope(readings: Readings): number | null {
	let best: number | null = null;
	let j = 0;
	for (let i = 0; i < readings.t.length; i++) {
		const from = readings.t[i] ?? NaN;
		while (j + 1 < readings.t.length && (readings.t[j + 1] ?? Infinity) - from <= FALL_MOST) j++;
		const length = (readings.t[j] ?? NaN) - from;
		if (!(length >= FALL_LEAST)) continue;
		const slope = (((readings.v[j] ?? NaN) - (readings.v[i] ?? NaN)) / length) * 60_000;
		if (best === null || slope < best) best = slope;
	}
	return best;
}

/**
 * secondsBelowCutout (s), degreeSecondsBelowCutout (K·s): evaporator saturation under the configured cut-out after the
 * start-up bypass, by the trapezoid between samples; recoverySeconds: from first going under to being back, s. Absent
 * where the spacing exceeds 15 s or no cut-out is set; a stretch over a gap counts nothing.
 */
export function readBelowCutout(context: FigureContext, sheet: Figures): void {
	const keys = ['secondsBelowCutout', 'degreeSecondsBelowCutout', 'recoverySeconds'] as const;
	const all = (value: ReturnType<typeof absence>) => keys.forEach((key) => put(sheet, key, value));
	const cutout = context.circuit.limit('evapSaturationCutout', context.startedAt);
	const bypass = context.circuit.limit('startBypass', context.startedAt) ?? 0;
	const found = during(context, 'evapSaturation', bypass, Infinity, 2);
	if (!('v' in found)) return all(found);
	if (cutout === null) return all(absence('no-limit', 'No low-saturation cut-out is set for this unit.'));
	const spacing = spacingWithin(
		found.series,
		context.startedAt,
		Math.min(context.run.lastOn, context.startedAt + 600_000)
	);
	if (spacing !== null && spacing > 15) {
		return all(absence('too-coarse', `Sampled every ${Math.round(spacing)} s; this needs 15 s or less.`));
	}
	const below = timeBelow(found, cutout);
	put(sheet, 'secondsBelowCutout', below.seconds);
	put(sheet, 'degreeSecondsBelowCutout', below.degreeSeconds);
	if (below.recovery !== null) return put(sheet, 'recoverySeconds', below.recovery);
	const detail = below.seconds > 0 ? 'It did not come back above the cut-out.' : 'It did not go under the cut-out.';
	put(sheet, 'recoverySeconds', absence('does-not-apply', detail));
}

/** Time (s) and area (K·s) under a level between samples no more than 60 s apart, crossings on the straight line. */
export function timeBelow(readings: Readings, level: number) {
	let seconds = 0;
	let degreeSeconds = 0;
	let wentUnder: number | null = null;
	let recovery: number | null = null;
	for (let i = 1; i < readings.t.length; i++) {
		const from = readings.t[i - 1] ?? NaN;
		const length = ((readings.t[i] ?? NaN) - from) / 1000;
		const a = level - (readings.v[i - 1] ?? NaN);
		const b = level - (readings.v[i] ?? NaN);
		if (length > 60 || (a <= 0 && b <= 0)) continue;
		// Share of the stretch that is under the level, and where it begins.
		const crossing = a * b < 0 ? a / (a - b) : null;
		const under = crossing === null ? 1 : a > 0 ? crossing : 1 - crossing;
		seconds += under * length;
		degreeSeconds += (crossing === null ? (a + b) / 2 : Math.max(a, b) / 2) * under * length;
		if (wentUnder === null) wentUnder = from + (a > 0 || crossing === null ? 0 : crossing) * length * 1000;
		if (a > 0 && b <= 0 && recovery === null) recovery = (from + (crossing ?? 1) * length * 1000 - wentUnder) / 1000;
	}
	return { seconds, degreeSeconds, recovery };
}

/** minSuperheat, minDischargeSuperheat (K): the least from 60 s to the stop. */
export function readLeastSuperheats(context: FigureContext, sheet: Figures): void {
	for (const [key, id] of [
		['minSuperheat', 'superheat'],
		['minDischargeSuperheat', 'dischargeSuperheat']
	] as const) {
		const found = during(context, id, 60, Infinity);
		put(sheet, key, 'v' in found ? (extreme(found, 1)?.value ?? NaN) : found);
	}
}

/** pullDownRate, K/min: Theil–Sen slope of leaving water over 1–5 min; negative while the water cools. A minute at least. */
export function readPullDown(context: FigureContext, sheet: Figures): void {
	const found = during(context, 'evapWaterOut', 60, 300, 2);
	if (!('v' in found)) return put(sheet, 'pullDownRate', found);
	const minutes = found.t.map((t) => (t - context.startedAt) / 60_000);
	if ((minutes.at(-1) ?? 0) - (minutes[0] ?? 0) < 1) return put(sheet, 'pullDownRate', shortRun(context, 60));
	put(sheet, 'pullDownRate', theilSen(minutes, found.v) ?? NaN);
}

/** A valve within 1 % of full travel is at its limit. */
const VALVE_LIMIT = 99;

/**
 * maxValvePosition, meanValvePosition (%) and secondsAtValveLimit (s at 99 % or more), start to stop. Mean and time
 * weigh each reading with the time to the next one, a minute or three spacings at most.
 */
export function readValve(context: FigureContext, sheet: Figures): void {
	const found = during(context, 'valvePosition', 0, Infinity);
	const keys = ['maxValvePosition', 'meanValvePosition', 'secondsAtValveLimit'] as const;
	if (!('v' in found)) return keys.forEach((key) => put(sheet, key, found));
	put(sheet, 'maxValvePosition', extreme(found, -1)?.value ?? NaN);
	let sum = 0;
	let weight = 0;
	let atLimit = 0;
	for (let i = 0; i < found.v.length; i++) {
		const next = found.t[i + 1] ?? (context.stopped ? context.stop : (found.t[i] ?? NaN));
		const hold = Math.min((next - (found.t[i] ?? NaN)) / 1000, Math.max(60, 3 * context.spacing));
		const v = found.v[i] ?? NaN;
		sum += v * hold;
		weight += hold;
		if (v >= VALVE_LIMIT) atLimit += hold;
	}
	put(sheet, 'meanValvePosition', weight > 0 ? sum / weight : (found.v[0] ?? NaN));
	put(sheet, 'secondsAtValveLimit', atLimit);
}
