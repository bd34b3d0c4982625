import { fromStored, type MeasureKey, MEASURES } from '$lib/model/quantities';
import type { LimitKey, LimitValue } from '$lib/model/unit';
import { valueTicks } from '$lib/utils/axis-ticks';
import { lowerBound } from '$lib/utils/trace-path';
import type { StartTraces } from './start-traces';
import type { StripLimit, StripSpec } from './strips';

/** Limits in force on the day of the start. */
export type LimitsInForce = Partial<Record<LimitKey, LimitValue>>;

/** The value axis of a strip in the printed unit of measure, and stored values to px. */
export type StripDomain = {
	measure: MeasureKey;
	low: number;
	high: number;
	ticks: { value: number; y: number }[];
	/** px of a stored value */
	y: (stored: number) => number;
	/** px of a value in the printed unit of measure */
	yPrinted: (value: number) => number;
};

const PAD = 4;

/** Least and most of a strip's drawn traces within a window, stored units. */
function extremes(spec: StripSpec, sets: readonly StartTraces[], window: { from: number; to: number }): number[] {
	const values: number[] = [];
	for (const set of sets)
		for (const { key } of spec.traces) {
			const trace = set.traces.get(key);
			if (!trace) continue;
			let low = Infinity;
			let high = -Infinity;
			const end = lowerBound(trace.t, set.startMs + window.to * 1000);
			for (let i = lowerBound(trace.t, set.startMs + window.from * 1000); i < end; i++) {
				const value = trace.v[i] ?? Number.NaN;
				if (value < low) low = value;
				if (value > high) high = value;
			}
			if (low <= high) values.push(low, high);
		}
	return values;
}

/** A limit belongs on the axis when it is near the readings, or when its strip always shows it. */
export function limitOnAxis(limit: StripLimit, value: number, low: number, high: number, least: number): boolean {
	if (limit.always) return true;
	const room = Math.max(least, (high - low) * 0.35);
	return value >= low - room && value <= high + room;
}

/**
 * The value axis of one strip over a window: round ticks, the readings of every start drawn, and the limits near them.
 * @param height px of the strip
 * @param window seconds from the start
 * @param air kPa absolute at the site, for gauge pressures
 */
export function stripDomain(
	spec: StripSpec,
	sets: readonly StartTraces[],
	limits: LimitsInForce,
	measure: MeasureKey,
	window: { from: number; to: number },
	height: number,
	air: number
): StripDomain {
	const print = (stored: number) => fromStored(stored, measure, air);
	const fixed = spec.fixed;
	let values = fixed ? [fixed.low, fixed.high] : extremes(spec, sets, window);
	if (!fixed && values.length > 0) {
		const [low, high] = [Math.min(...values), Math.max(...values)];
		const near = spec.limits.flatMap((limit) => {
			const value = limits[limit.key]?.value;
			return value !== undefined && limitOnAxis(limit, value, low, high, spec.least) ? [value] : [];
		});
		values = [...values, ...near];
	}
	const most = height < 56 ? 3 : height < 100 ? 4 : 5;
	const axis = valueTicks(values.map(print), most, spec.least * Math.abs(MEASURES[measure].factor));
	const [low, high] = fixed ? [print(fixed.low), print(fixed.high)] : [axis.low, axis.high];
	const yPrinted = (value: number) => height - PAD - ((value - low) / (high - low)) * (height - 2 * PAD);
	const shown = axis.ticks.filter((value) => value >= low && value <= high);
	return {
		measure,
		low,
		high,
		ticks: shown.map((value) => ({ value, y: yPrinted(value) })),
		y: (stored) => yPrinted(print(stored)),
		yPrinted
	};
}
