import type { Interval } from '$lib/model/series';
import type { FigureKey } from '$lib/model/start';
import { median } from '../series/numbers';
import { localSpacing } from '../series/spacing';
import { join2 } from '../series/derived';
import { hasReadings, readingsWithin } from '../series/window';
import { absence, labelOf, missing, put, type Absence, type FigureContext, type Figures, type TraceId } from './sheet';
import { goodStretches, sliding, type Sliding } from './sliding';

/** Settled [ours]: capacity under 1 point/min, leaving water under 0.1 K/min, 5 min or more, after 10 min. */
const CAPACITY_RATE = 1 / 60;
const WATER_RATE = 0.1 / 60;
const LEAST_MS = 300_000;
const AFTER_S = 600;
const BEFORE_STOP_S = 30;

/**
 * The longest stretch of 5 min or more that begins after 10 min and ends 30 s before the stop, with capacity moving
 * under 1 point/min and leaving water under 0.1 K/min: the union of the 5-min windows (three spacings where the log is
 * coarser) whose least-squares slopes stay under both. Speed stands in for capacity; a signal that is not logged is
 * left out, but one of them must be there.
 */
export function settledStretch(context: FigureContext): Interval | Absence {
	const from = context.startedAt + AFTER_S * 1000;
	const to = context.stopped ? context.stop - BEFORE_STOP_S * 1000 : context.run.lastOn;
	if (to - from < LEAST_MS) {
		return absence('run-too-short', 'It ran too short to settle: 5 min after the first 10 min are needed.');
	}
	const load = context.circuit.trace('capacity') ?? context.circuit.trace('speed');
	const water = context.circuit.trace('evapWaterOut');
	if (load === undefined && water === undefined) {
		return absence('signal-missing', 'The log has neither capacity nor leaving water, so settling cannot be told.');
	}
	const middle = (from + to) / 2;
	const spacing = Math.max(...[load, water].map((s) => (s === undefined ? 0 : (localSpacing(s, middle) ?? 0))));
	const width = Math.max(LEAST_MS, 3000 * spacing);
	const parts: [Sliding, number][] = [];
	if (load !== undefined) parts.push([sliding(readingsWithin(load, from, to)), CAPACITY_RATE]);
	if (water !== undefined) parts.push([sliding(readingsWithin(water, from, to)), WATER_RATE]);
	const steady = (a: number, b: number) => parts.every(([part, rate]) => slowerThan(part, rate, a, b));
	const stretches = goodStretches(from, to, width, 30_000, steady);
	const longest = stretches.reduce<Interval | null>(
		(a, b) => (a !== null && a.to - a.from >= b.to - b.from ? a : b),
		null
	);
	return longest ?? absence('no-settled-stretch', 'Capacity or leaving water never settled for 5 min.');
}

/** Readings must cover most of the window, or the slope is that of a corner of it. */
function slowerThan(part: Sliding, rate: number, from: number, to: number): boolean {
	const fit = part.fitWithin(from, to, 0.6);
	return fit !== null && Math.abs(fit.slope) < rate;
}

const MEDIANS: readonly (readonly [FigureKey, TraceId])[] = [
	['evapApproach', 'evapApproach'],
	['condApproach', 'condApproach'],
	['superheat', 'superheat'],
	['settledDischargeSuperheat', 'dischargeSuperheat'],
	['settledSubcooling', 'subcooling'],
	['settledMargin', 'margin'],
	['settledCapacity', 'capacity'],
	['settledLift', 'lift'],
	['settledOilTemp', 'oilTemp'],
	['evapDelta', 'evapDelta'],
	['flow', 'evapFlow'],
	['duty', 'duty']
];

/** The figures of the settled stretch: medians of its readings; settledSeconds is its length; powerPerDuty is kW of power a kW of duty. */
export function readSettled(context: FigureContext, sheet: Figures, stretch: Interval | Absence): void {
	put(sheet, 'settledSeconds', 'from' in stretch ? (stretch.to - stretch.from) / 1000 : stretch);
	for (const [key, id] of MEDIANS) put(sheet, key, settledMedian(context, id, stretch));
	put(sheet, 'powerPerDuty', powerPerDuty(context, stretch));
}

function settledMedian(context: FigureContext, id: TraceId, stretch: Interval | Absence): number | Absence {
	if (id === 'condApproach' && context.circuit.input.nature.condenser === 'air') {
		return absence('does-not-apply', 'The condenser is air-cooled.');
	}
	const series = context.circuit.trace(id);
	if (series === undefined) return missing(context, id);
	if (!('from' in stretch)) return stretch;
	const middle = median(readingsWithin(series, stretch.from, stretch.to).v);
	return middle ?? absence('gap', `The log has no ${labelOf(id)} in the settled stretch.`);
}

function powerPerDuty(context: FigureContext, stretch: Interval | Absence): number | Absence {
	const { trace } = context.circuit;
	const power = trace('power');
	const duty = trace('duty');
	if (!hasReadings(power)) return missing(context, 'power');
	if (!hasReadings(duty)) return missing(context, 'duty');
	if (!('from' in stretch)) return stretch;
	const window = (series: typeof power) => readingsWithin(series, stretch.from, stretch.to);
	const ratio = join2({ ...power, ...window(power) }, { ...duty, ...window(duty) }, (p, d) => (d > 0 ? p / d : NaN));
	return median(ratio.v) ?? absence('gap', 'Power and duty were never read together in the settled stretch.');
}
