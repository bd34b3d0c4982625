import type { Brief, BriefStart } from '../model/wire/visit';
import type { DayStrip } from '../model/wire/views';
import { valueTicks } from './axis-ticks';
import { dayParts } from './clock';
import { formatNumber } from './format';
import { joinStrokes, strokeShape, type StrokeShape } from './stroke-geometry';
import { tracePath } from './trace-path';

/** The pictures of a brief as path data and placed words: the page and the PDF draw the very same geometry. */

export type PlacedText = { x: number; y: number; text: string; anchor: 'start' | 'middle' | 'end' };
export type DaysPicture = {
	width: number;
	height: number;
	frame: string;
	grid: string;
	/** stretches without a log */
	bare: string;
	strokes: StrokeShape;
	hours: PlacedText[];
	dates: PlacedText[];
};

const n = (value: number): string => String(Math.round(value * 100) / 100);
const LEFT = 34;
const TOP = 16;
const HOUR = 60;

/** The clock window of some days: whole even hours around every run, at least six hours. */
function clockWindow(days: readonly DayStrip[]): { from: number; to: number } {
	const strokes = days.flatMap((day) => day.strokes);
	if (strokes.length === 0) return { from: 0, to: 24 * HOUR };
	const first = Math.min(...strokes.map((stroke) => stroke.from));
	const last = Math.max(...strokes.map((stroke) => stroke.to));
	const from = Math.max(0, Math.floor(first / (2 * HOUR)) * 2 * HOUR);
	const to = Math.min(24 * HOUR, Math.max(from + 6 * HOUR, Math.ceil(last / (2 * HOUR)) * 2 * HOUR));
	return { from, to };
}

/** A few days as day strips: one row a day, the site's clock from left to right. */
export function daysPicture(days: readonly DayStrip[], width: number, row = 13): DaysPicture {
	const { from, to } = clockWindow(days);
	const height = TOP + days.length * row + 2;
	const x = (minute: number): number =>
		LEFT + ((Math.min(Math.max(minute, from), to) - from) / (to - from)) * (width - LEFT - 3);
	const step = to - from > 12 * HOUR ? 4 * HOUR : 2 * HOUR;
	const marks = Array.from({ length: Math.floor((to - from) / step) + 1 }, (_, i) => from + i * step);
	const shapes: StrokeShape[] = [];
	let bare = '';
	days.forEach((day, i) => {
		const y = TOP + i * row + row / 2;
		if (day.logged.length === 0) bare += `M${n(LEFT)} ${n(y)}H${n(width - 1)}`;
		for (const { from: begin, to: end, outcome, goesOn } of day.strokes)
			shapes.push(strokeShape({ x0: x(begin), x1: x(end), y, h: 4.6, row, outcome, goesOn }));
	});
	return {
		width,
		height,
		frame: `M${LEFT} ${TOP}H${n(width - 1)}V${n(height - 1)}H${LEFT}z`,
		grid: marks.map((minute) => `M${n(x(minute))} ${TOP}V${n(height - 1)}`).join(''),
		bare,
		strokes: joinStrokes(shapes),
		hours: marks.map((minute) => ({
			x: x(minute),
			y: TOP - 5,
			text: String(minute / HOUR).padStart(2, '0'),
			anchor: 'middle' as const
		})),
		dates: days.map((day, i) => ({
			x: LEFT - 6,
			y: TOP + i * row + row / 2 + 3.5,
			text: dayParts(day.date).day,
			anchor: 'end' as const
		}))
	};
}

export type StartPicture = {
	width: number;
	height: number;
	frame: string;
	grid: string;
	/** the start itself */
	zero: string;
	traces: { path: string; family: string; label: PlacedText | null }[];
	level: { path: string; label: PlacedText } | null;
	trip: string;
	values: PlacedText[];
	times: PlacedText[];
};

const FOOT = 17;

/** A trace's name near its beginning: over the upper trace, under the lower one, left of the trip. */
function traceLabel(
	trace: BriefStart['traces'][number],
	upper: boolean,
	x: (s: number) => number,
	y: (v: number) => number,
	box: { top: number; bottom: number }
): PlacedText | null {
	const at = trace.t.findIndex((t, i) => t >= (upper ? 12 : 4) && typeof trace.v[i] === 'number');
	const value = trace.v[at];
	if (typeof value !== 'number') return null;
	const wanted = upper ? y(value) - 6 : y(value) + 20;
	return {
		x: x(trace.t[at] ?? 0) + 2,
		y: Math.min(Math.max(wanted, box.top + 9), box.bottom - 4),
		text: trace.label,
		anchor: 'start'
	};
}

/** The middle of a trace's readings, to tell the upper from the lower one. */
function middleOf({ v }: BriefStart['traces'][number]): number {
	const values = v.filter((value) => value !== null);
	return values.reduce((sum, value) => sum + value, 0) / Math.max(1, values.length);
}

/** One start of a brief on the brief's common axis; `named` puts the traces' names into it. */
export function startPicture(
	start: BriefStart,
	axis: NonNullable<Brief['axis']>,
	size: { width: number; height: number },
	named: boolean
): StartPicture {
	const { width, height } = size;
	const [top, bottom] = [4, height - FOOT];
	const window = { from: -30, to: axis.toSeconds };
	const x = (seconds: number): number =>
		LEFT + ((seconds - window.from) / (window.to - window.from)) * (width - LEFT - 1);
	const y = (value: number): number => bottom - ((value - axis.low) / (axis.high - axis.low)) * (bottom - top);
	const { ticks } = valueTicks([axis.low, axis.high], 3, 1);
	const inside = ticks.filter((tick) => tick >= axis.low && tick <= axis.high);
	const minutes = axis.toSeconds / 60;
	const step = [1, 2, 5, 10].find((size) => minutes / size <= 4) ?? 15;
	const times = Array.from({ length: Math.floor(minutes / step) + 1 }, (_, i) => i * step);
	const plane = { x, y };
	const highest = Math.max(...start.traces.map(middleOf));
	return {
		width,
		height,
		frame: `M${LEFT} ${top}H${n(width - 1)}V${n(bottom)}H${LEFT}z`,
		grid:
			inside.map((value) => `M${LEFT} ${n(y(value))}H${n(width - 1)}`).join('') +
			times.map((minute) => `M${n(x(minute * 60))} ${top}V${n(bottom)}`).join(''),
		zero: `M${n(x(0))} ${top}V${n(bottom)}`,
		traces: start.traces.map((trace) => ({
			path: tracePath(
				{ t: trace.t.filter((t) => t <= axis.toSeconds), v: trace.v.map((value) => value ?? Number.NaN) },
				plane,
				window
			),
			family: trace.family,
			label: named ? traceLabel(trace, middleOf(trace) === highest, x, y, { top, bottom }) : null
		})),
		level:
			start.cutout === null
				? null
				: {
						path: `M${LEFT} ${n(y(start.cutout))}H${n(width - 1)}`,
						label: {
							x: width - 5,
							y: y(start.cutout) + 12 < bottom ? y(start.cutout) + 12 : y(start.cutout) - 4,
							text: `cut-out ${formatNumber(start.cutout, 1)} ${axis.symbol}`,
							anchor: 'end'
						}
					},
		trip: start.tripAt === null || start.tripAt > axis.toSeconds ? '' : `M${n(x(start.tripAt))} ${top}V${n(bottom)}`,
		values: inside.map((value, i) => ({
			x: LEFT - 5,
			y: y(value) + 3.5,
			text: i === inside.length - 1 ? `${formatNumber(value)}` : formatNumber(value),
			anchor: 'end' as const
		})),
		times: [
			...times.map((minute) => ({ x: x(minute * 60), y: height - 4, text: String(minute), anchor: 'middle' as const })),
			{ x: width - 1, y: height - 4, text: 'min', anchor: 'end' as const }
		].filter((entry, i, all) => i === all.length - 1 || entry.x < width - 30)
	};
}
