import { fromStored, MEASURES, type MeasureKey } from '$lib/model/quantities';
import type { FirstMover } from '$lib/model/wire/start-sheet';
import { bandPath } from '$lib/utils/area-path';
import { formatElapsed } from '$lib/utils/clock';
import { decimalsOf, formatNumber, withUnit } from '$lib/utils/format';
import { nearestSample } from '$lib/utils/nearest-sample';
import { type PaperScale, toPixel } from '$lib/utils/paper-scale';
import { formatDuration } from '$lib/utils/clock';
import { readTrace } from './read-strip';
import { printedMeasure, type StartTraces } from './start-traces';
import { drawStrip, type StripDrawing } from './strip-drawing';
import { type LimitsInForce, stripDomain, type StripDomain } from './strip-domain';
import { type Dimension, labelStrip, type StripLabel } from './strip-labels';
import type { StripSpec } from './strips';
import type { UnitSystem } from '$lib/model/quantities';

/** What a strip needs to know of its sheet. */
export type SheetFacts = {
	main: StartTraces | null;
	others: readonly { set: StartTraces; label: string }[];
	limits: LimitsInForce;
	units: UnitSystem;
	air: number;
	firstMover: FirstMover | null;
	/** Changes once, when the fonts have come and widths must be measured again. */
	fontsReady: boolean;
	stall: { from: number; to: number; levelPct: number; demandPct: number | null } | null;
	tripSeconds: number | null;
	tripLabel: string;
	stopSeconds: number | null;
	narrow: boolean;
};

export type StripLayout = {
	domain: StripDomain;
	drawing: StripDrawing;
	labels: StripLabel[];
	dimensions: Dimension[];
	/** Median ± 3 MAD of the held starts, path data. */
	heldBands: string[];
	stall: string;
	ring: { x: number; y: number; text: string } | null;
	/** px where limits begin to hold: the start. */
	limitFrom: number;
	tick: (value: number) => string;
	gapWords: (minutes: number) => string;
	description: string;
};

/** The lift as a dimension line at one minute, of the start and of the ghost, where both saturations were read. */
function liftDimensions(spec: StripSpec, facts: SheetFacts, scale: PaperScale, domain: StripDomain): Dimension[] {
	if (spec.key !== 'condenser' || !facts.main) return [];
	const measure: MeasureKey = facts.units === 'ip' ? 'degFdiff' : 'K';
	const sets = [
		{ set: facts.main, at: 60, word: 'lift' },
		...facts.others.map(({ set }) => ({ set, at: 75, word: 'held lift' }))
	];
	return sets.slice(0, 2).flatMap(({ set, at, word }) => {
		const x = toPixel(scale, at);
		if (x < 8 || x > scale.width - 8) return [];
		const low = readTrace(set, 'evapSaturation', at, facts.units, facts.air);
		const high = readTrace(set, 'condSaturation', at, facts.units, facts.air);
		if (!low || !high) return [];
		const [top, bottom] = [domain.y(high.stored), domain.y(low.stored)];
		if (bottom - top < 18) return [];
		const lift = fromStored(high.stored - low.stored, measure);
		const text = `${withUnit(formatNumber(lift, 1), MEASURES[measure].symbol.replace(' diff.', ''))} ${word}`;
		return [{ key: `lift:${set.startId}`, x, top, bottom, text }];
	});
}

/** Where this strip's trace left the band of the held starts, if it was one of the first movers. */
function departureRing(
	spec: StripSpec,
	facts: SheetFacts,
	scale: PaperScale,
	domain: StripDomain
): StripLayout['ring'] {
	const own = new Set<string>(spec.traces.filter(({ faint }) => !faint).map(({ key }) => key));
	const left = facts.firstMover?.departures.find(({ signal }) => own.has(signal));
	const trace = left && facts.main?.traces.get(left.signal as (typeof spec.traces)[number]['key']);
	if (!left || !trace || !facts.main) return null;
	const sample = nearestSample(trace, facts.main.startMs + left.atSeconds * 1000, trace.hold, 60_000);
	const x = toPixel(scale, left.atSeconds);
	if (!sample || x < 6 || x > scale.width - 6) return null;
	const side = left.direction === 'below' ? 'under' : 'over';
	return { x, y: domain.y(sample.value), text: `${side} the band at ${formatElapsed(left.atSeconds)}` };
}

/** Bands of the held starts for the strip's signals. They come in the person's units, as the axis is. */
function heldBands(spec: StripSpec, facts: SheetFacts, scale: PaperScale, domain: StripDomain): string[] {
	if (spec.quantity === 'pressure') return [];
	const own = new Set<string>(spec.traces.filter(({ faint }) => !faint).map(({ key }) => key));
	return (facts.firstMover?.bands ?? [])
		.filter(({ signal }) => own.has(signal))
		.map(({ t, low, high }) =>
			bandPath(
				t.map((s) => toPixel(scale, s)),
				low,
				high,
				domain.yPrinted
			)
		);
}

/** The stall as a hatch between what was reached and what was asked. */
function stallHatch(spec: StripSpec, facts: SheetFacts, scale: PaperScale, domain: StripDomain): string {
	const { stall, main } = facts;
	if (spec.key !== 'loading' || !stall || !main) return '';
	const x0 = toPixel(scale, (stall.from - main.startMs) / 1000);
	const x1 = toPixel(scale, (stall.to - main.startMs) / 1000);
	const top = domain.y(Math.max(stall.demandPct ?? 100, stall.levelPct + 4));
	return `M${x0} ${top}H${x1}V${domain.y(stall.levelPct)}H${x0}Z`;
}

/** What a reader who cannot see the strip is told of it. */
function describe(spec: StripSpec, main: StartTraces, units: UnitSystem, air: number): string {
	const said = spec.traces.flatMap(({ key, label }) => {
		const reading = readTrace(main, key, 0, units, air);
		return reading ? [`${label} ${reading.text} at the start`] : [];
	});
	return said.length > 0 ? said.join(', ') : 'no reading at the start';
}

function symbolAfter(measure: MeasureKey): string {
	return MEASURES[measure].symbol.replace(' diff.', '');
}

/**
 * Lays out one strip in px: axis, drawing, labels on free paper. The cursor is no part of it, so moving it redraws nothing.
 * @param first the topmost strip; on a phone it carries the trip's words
 */
export function layOutStrip(
	spec: StripSpec,
	facts: SheetFacts,
	scale: PaperScale,
	height: number,
	first: boolean
): StripLayout | null {
	void facts.fontsReady;
	const { main, others, limits, units, air } = facts;
	if (!main) return null;
	const shown = spec.traces.map(({ key }) => main.traces.get(key)).find((trace) => trace !== undefined);
	if (!shown) return null;
	const measure = printedMeasure(shown, units);
	const sets = [main, ...others.map(({ set }) => set)];
	const domain = stripDomain(spec, sets, limits, measure, scale, height, air);
	const drawing = drawStrip(spec, main, others, limits, scale, domain, height);
	const startX = toPixel(scale, 0);
	const dimensions = liftDimensions(spec, facts, scale, domain);
	const ring = departureRing(spec, facts, scale, domain);
	const tripX = facts.tripSeconds === null ? null : toPixel(scale, facts.tripSeconds);
	const stopX = facts.stopSeconds === null ? null : toPixel(scale, facts.stopSeconds);
	const breaks = scale.breakAt === null ? [] : [scale.fastEnd, scale.slowBegin];
	const uprights = [startX, tripX, stopX, ...breaks].filter((x): x is number => x !== null);
	const flag = first && facts.narrow && tripX !== null ? { x: tripX, text: facts.tripLabel } : null;
	const decimals = decimalsOf(measure);
	const print = (stored: number) =>
		withUnit(formatNumber(fromStored(stored, measure, air), decimals), symbolAfter(measure));
	const labels = labelStrip({
		drawing,
		width: scale.width,
		height,
		startX,
		uprights,
		print: spec.quantity === 'percent' ? (v) => withUnit(formatNumber(v), '%') : print,
		dimensions,
		ring,
		flag
	});
	const words = new Set(labels.map(({ key }) => key));
	return {
		domain,
		drawing,
		labels,
		// A dimension whose figure found no room is not drawn either.
		dimensions: dimensions.filter(({ key }) => words.has(key)),
		heldBands: heldBands(spec, facts, scale, domain),
		stall: stallHatch(spec, facts, scale, domain),
		ring: words.has('ring') ? ring : null,
		limitFrom: Math.max(0, startX),
		tick: (value) => formatNumber(value, Number.isInteger(value) ? 0 : 1),
		gapWords: (minutes) => formatDuration(minutes * 60),
		description: describe(spec, main, units, air)
	};
}
