import type { Family, TraceKey } from '$lib/model/signals';
import { GHOST_WIDTH, inkOf, traceStyle } from '$lib/components/charts/trace-style';
import { areaBelow } from '$lib/utils/area-path';
import { type PaperScale, toPixel } from '$lib/utils/paper-scale';
import { type Extents, traceExtents } from '$lib/utils/trace-extents';
import { lonePoints, samplePoints, tracePath } from '$lib/utils/trace-path';
import type { LimitsInForce, StripDomain } from './strip-domain';
import type { StartTrace, StartTraces } from './start-traces';
import type { StripSpec } from './strips';

export type DrawnTrace = {
	key: TraceKey;
	startId: string;
	label: string;
	family: Family;
	role: 'own' | 'faint' | 'ghost';
	ink: string;
	width: number;
	dash: string | null;
	path: string;
	/** Readings that stand alone, and the points of coarse sampling. */
	points: [number, number][];
	extents: Extents;
};

export type DrawnLimit = {
	key: string;
	name: string;
	kind: 'trip' | 'usual';
	edge: 'below' | 'above';
	y: number;
	stored: number;
	provenance: string;
};

export type StripDrawing = {
	traces: DrawnTrace[];
	limits: DrawnLimit[];
	band: { top: number; bottom: number; name: string; low: number; high: number; provenance: string } | null;
	/** Hatch below a trip limit, path data. */
	below: string;
	gaps: { x: number; width: number; minutes: number }[];
};

function drawTrace(
	trace: StartTrace,
	set: StartTraces,
	label: string,
	role: DrawnTrace['role'],
	scale: PaperScale,
	domain: StripDomain
): DrawnTrace {
	const style = traceStyle(trace.key);
	const plane = { x: (ms: number) => toPixel(scale, (ms - set.startMs) / 1000), y: domain.y };
	const window = { from: set.startMs + scale.from * 1000, to: set.startMs + scale.to * 1000 };
	return {
		key: trace.key,
		startId: set.startId,
		label,
		family: style.family,
		role,
		ink: inkOf(style.family, role === 'ghost'),
		width: role === 'own' ? style.width : GHOST_WIDTH,
		dash: style.dash,
		path: tracePath(trace, plane, window, { step: trace.hold }),
		points: [...lonePoints(trace, plane, window), ...(role === 'own' ? samplePoints(trace, plane, window) : [])],
		extents: traceExtents(trace, plane.x, plane.y, window, scale.width, trace.hold)
	};
}

/** The gaps of a log on the paper; a gap without width on the paper is not drawn. */
function drawGaps(set: StartTraces, scale: PaperScale): StripDrawing['gaps'] {
	return set.gaps.flatMap(({ from, to }) => {
		const left = Math.max(0, toPixel(scale, (from - set.startMs) / 1000));
		const right = Math.min(scale.width, toPixel(scale, (to - set.startMs) / 1000));
		return right - left < 1 ? [] : [{ x: left, width: right - left, minutes: (to - from) / 60_000 }];
	});
}

function drawBand(spec: StripSpec, limits: LimitsInForce, domain: StripDomain): StripDrawing['band'] {
	if (!spec.band) return null;
	const low = limits[spec.band.low];
	const high = limits[spec.band.high];
	if (!low || !high) return null;
	return {
		top: domain.y(high.value),
		bottom: domain.y(low.value),
		name: spec.band.name,
		low: low.value,
		high: high.value,
		provenance: high.provenance
	};
}

function drawLimits(spec: StripSpec, limits: LimitsInForce, domain: StripDomain, height: number): DrawnLimit[] {
	return spec.limits.flatMap((limit) => {
		const value = limits[limit.key];
		const y = value ? domain.y(value.value) : Number.NaN;
		if (!value || !(y >= 0 && y <= height)) return [];
		return [{ ...limit, y, stored: value.value, provenance: value.provenance }];
	});
}

/** Strips whose stretch below a low trip limit is hatched; elsewhere a start begins below as a matter of course. */
const HATCHED: Readonly<Record<string, TraceKey>> = { 'low-side': 'evapSaturation', margin: 'margin' };

/** Hatch of the readings below the strip's first low trip limit, from the start on. */
function drawBelow(
	drawn: StripDrawing['limits'],
	spec: StripSpec,
	set: StartTraces,
	scale: PaperScale,
	y: StripDomain['y']
) {
	const limit = drawn.find(({ kind, edge }) => kind === 'trip' && edge === 'below');
	const key = HATCHED[spec.key];
	const trace = key ? set.traces.get(key) : undefined;
	if (!limit || !trace) return '';
	const plane = { x: (ms: number) => toPixel(scale, (ms - set.startMs) / 1000), y };
	const from = set.startMs + Math.max(0, scale.from) * 1000;
	return areaBelow(trace, limit.stored, plane, { from, to: set.startMs + scale.to * 1000 }, trace.hold);
}

/**
 * Everything of one strip but its words: paths and boxes in px. Ghosts come first, so that the start lies over them.
 * @param others held starts underneath and further starts, each aligned at its own start
 */
export function drawStrip(
	spec: StripSpec,
	main: StartTraces,
	others: readonly { set: StartTraces; label: string }[],
	limits: LimitsInForce,
	scale: PaperScale,
	domain: StripDomain,
	height: number
): StripDrawing {
	const traces: DrawnTrace[] = [];
	for (const { set, label } of others)
		for (const { key, faint } of spec.traces) {
			const trace = set.traces.get(key);
			if (!trace || faint) continue;
			traces.push(drawTrace(trace, set, label, 'ghost', scale, domain));
		}
	for (const { key, label, faint } of spec.traces) {
		const trace = main.traces.get(key);
		if (trace) traces.push(drawTrace(trace, main, label, faint ? 'faint' : 'own', scale, domain));
	}
	const drawnLimits = drawLimits(spec, limits, domain, height);
	return {
		traces,
		limits: drawnLimits,
		band: drawBand(spec, limits, domain),
		below: drawBelow(drawnLimits, spec, main, scale, domain.y),
		gaps: drawGaps(main, scale)
	};
}
