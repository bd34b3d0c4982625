import type { StartRecord } from '$lib/model/start';
import { saturationTemperature } from '../refrigerants/saturation';
import { median } from '../statistics/median';
import { medianAbsoluteDeviation } from '../statistics/median-absolute-deviation';
import type { Context } from './context';
import type { Readable } from './trace-reader';

const MINUTE = 60_000;
/** A rest this long has let saturation and water come together (method.md, "The night read as a test"). */
const REST_SECONDS = 20 * 60;

export type RestOffset = {
	/** Median over rests. */
	value: number;
	/** MAD over rests. */
	spread: number;
	rests: StartRecord[];
	/** Water was proved to move. */
	proved: boolean;
};

/** Was water proved to move over the window? null when neither pump, proof nor flow is logged. */
function waterMoves(context: Context, from: number, to: number): boolean | null {
	const signs = (['evapPumpRun', 'evapFlowProof'] as const)
		.map((id) => context.reader.values(id, from, to))
		.filter((values) => values.length > 0)
		.map((values) => values.every((value) => value === 1));
	const flow = context.reader.values('evapFlow', from, to);
	if (flow.length > 0) signs.push(Math.min(...flow) > 0.2 * (context.nature.designEvapFlow ?? Math.max(...flow)));
	return signs.length === 0 ? null : signs.every(Boolean);
}

/** Does the trace stand still over the window (under 0.1 K/min, or too few readings to move)? */
function flat(context: Context, trace: Readable, from: number, to: number): boolean {
	const middle = (from + to) / 2;
	const first = context.reader.median(trace, from, middle);
	const second = context.reader.median(trace, middle, to);
	return first === null || second === null || Math.abs(second - first) < (0.1 * (to - from)) / 2 / MINUTE;
}

/**
 * The resting offset between evaporator saturation and leaving water before the starts: compressor off for 20 min or
 * more, both flat, water moving (or, when nothing tells, both water temperatures together). Median over rests.
 * @param source the logged saturation, or that of the logged pressure
 */
export function restOffset(context: Context, source: 'logged' | 'pressure'): RestOffset | null {
	const found: { start: StartRecord; value: number; proved: boolean }[] = [];
	for (const start of context.starts) {
		if ((start.restSeconds ?? 0) < REST_SECONDS) continue;
		const to = start.startedAt - 1;
		const from = to - 4 * MINUTE;
		const moves = waterMoves(context, to - 1.5 * MINUTE, to);
		if (moves === false) continue;
		const water = context.reader.median('evapWaterOut', to - 1.5 * MINUTE, to);
		const saturation = restingSaturation(context, source, to - 1.5 * MINUTE, to);
		if (water === null || saturation === null) continue;
		const trace = source === 'logged' ? 'evapSaturation' : 'evapPressure';
		if (source === 'logged' && !flat(context, trace, from, to)) continue;
		const waterIn = context.reader.median('evapWaterIn', to - 1.5 * MINUTE, to);
		if (moves === null && (waterIn === null || Math.abs(waterIn - water) > 0.6)) continue;
		found.push({ start, value: saturation - water, proved: moves === true });
	}
	const value = median(found.map((one) => one.value));
	if (value === null || found.length < 3) return null;
	return {
		value,
		spread: medianAbsoluteDeviation(found.map((one) => one.value)) ?? 0,
		rests: found.map((one) => one.start),
		proved: found.filter((one) => one.proved).length * 2 > found.length
	};
}

function restingSaturation(context: Context, source: 'logged' | 'pressure', from: number, to: number): number | null {
	if (source === 'logged') return context.reader.median('evapSaturation', from, to);
	const pressure = context.reader.median('evapPressure', from, to);
	return pressure === null ? null : saturationTemperature(context.input.refrigerant, pressure);
}

/**
 * Suction minus evaporator saturation at rests of 1 h or more, 15 to 8 min before the start (pumps may start after that)
 * while saturation stands still; `air` is the outdoor reading minus saturation, null where none is logged. Null under
 * three such rests.
 */
export function suctionOffset(context: Context): { value: number; spread: number; air: number | null } | null {
	const found = { offsets: [] as number[], airs: [] as number[] };
	for (const start of context.starts) {
		if ((start.restSeconds ?? 0) < 3600) continue;
		const [from, to] = [start.startedAt - 15 * MINUTE, start.startedAt - 8 * MINUTE];
		const value = context.reader.median('superheat', from, to);
		if (value === null || !flat(context, 'evapSaturation', from, to)) continue;
		found.offsets.push(value);
		const air = context.reader.median('outdoorTemp', from, to);
		const saturation = context.reader.median('evapSaturation', from, to);
		if (air !== null && saturation !== null) found.airs.push(air - saturation);
	}
	const value = median(found.offsets);
	if (value === null || found.offsets.length < 3) return null;
	return { value, spread: medianAbsoluteDeviation(found.offsets) ?? 0, air: median(found.airs) };
}

/** Oil temperature over the ambient (the resting evaporator, else outdoor) at the end of rests of 6 h or more. */
export function oilOverAmbient(context: Context): { value: number; rests: StartRecord[] } | null {
	const found: { start: StartRecord; value: number }[] = [];
	for (const start of context.starts) {
		if ((start.restSeconds ?? 0) < 6 * 3600) continue;
		const from = start.startedAt - 10 * MINUTE;
		const oil = context.reader.median('oilTemp', from, start.startedAt - 1);
		const ambient =
			context.reader.median('evapSaturation', from, start.startedAt - 1) ??
			context.reader.median('outdoorTemp', from, start.startedAt - 1);
		if (oil !== null && ambient !== null) found.push({ start, value: oil - ambient });
	}
	const value = median(found.map((one) => one.value));
	return value === null ? null : { value, rests: found.map((one) => one.start) };
}
