import type { Outcome } from '../model/start';

/**
 * How a run is drawn: a stroke whose end says how it ended. One geometry serves miniatures, day strips, counts,
 * legends and progress. Every part is SVG path data in the caller's pixels, so many strokes join into one path.
 */
export type StrokeInput = {
	/** Left and right end on the time axis, px. */
	x0: number;
	x1: number;
	/** Middle of the stroke, px. */
	y: number;
	/** Stroke height h and row height R, px: 10 of 34 on phones, 5 of 15 in days, 1.8 of 4.3 in miniatures. */
	h: number;
	row: number;
	outcome: Outcome;
	/** The run goes on past this strip (over midnight): it ends square, its outcome shows where it ends. */
	goesOn?: boolean;
};

export type StrokeShape = {
	/** Filled in ink. */
	ink: string;
	/** Filled in the trip accent; drawn last, over neighbours. */
	trip: string;
	/** Outlined in ink, filled with field. */
	open: string;
	/** Slices of ink that fade. */
	fade: { path: string; opacity: number }[];
	/** Where the drawing ends, bar and dots included. */
	right: number;
};

/** A run is never narrower than this, px. */
export const LEAST_WIDTH = 3;
const LEAST_TRIP_BODY = 1.4;
/** Under this a bar vanishes on a screen of one device pixel a CSS pixel. */
const LEAST_BAR = 2;
const FADE_SLICES = 8;
const FADE_END = 0.08;

const n = (value: number) => String(Math.round(value * 100) / 100);
const rect = (x: number, y: number, w: number, h: number) => `M${n(x)} ${n(y)}h${n(w)}v${n(h)}h${n(-w)}z`;
const disc = (cx: number, cy: number, r: number) =>
	`M${n(cx - r)} ${n(cy)}a${n(r)} ${n(r)} 0 1 0 ${n(2 * r)} 0a${n(r)} ${n(r)} 0 1 0 ${n(-2 * r)} 0z`;

/**
 * The stroke of one run.
 * @throws RangeError when heights are not positive or the ends are no numbers
 */
export function strokeShape(input: StrokeInput): StrokeShape {
	const { x0, h, row } = input;
	if (!(h > 0) || !(row > 0)) throw new RangeError('a stroke needs positive heights');
	if (!Number.isFinite(x0) || !Number.isFinite(input.x1)) throw new RangeError('a stroke needs two ends');
	const x1 = Math.max(input.x1, x0);
	if (input.goesOn) return squareEnd({ ...input, x1: Math.max(x1, x0 + LEAST_WIDTH) });
	if (input.outcome === 'tripped') return trippedEnd({ ...input, x1 });
	const wide = { ...input, x1: Math.max(x1, x0 + LEAST_WIDTH) };
	if (input.outcome === 'held') return heldEnd(wide);
	if (input.outcome === 'called-off') return calledOffEnd(wide);
	return fadingEnd(wide, input.outcome === 'lost');
}

function squareEnd({ x0, x1, y, h }: StrokeInput): StrokeShape {
	return { ink: rect(x0, y - h / 2, x1 - x0, h), trip: '', open: '', fade: [], right: x1 };
}

/** Cut on a slant h/2 shorter at the foot, a gap of h/3, then the bar. */
function trippedEnd({ x0, x1, y, h, row }: StrokeInput): StrokeShape {
	const head = Math.max(x1, x0 + LEAST_TRIP_BODY);
	const foot = head - Math.min(h / 2, 0.7 * (head - x0));
	const [top, bottom] = [y - h / 2, y + h / 2];
	const [bar, barWidth] = [head + h / 3, Math.max(h / 3, LEAST_BAR)];
	return {
		ink: `M${n(x0)} ${n(top)}H${n(head)}L${n(foot)} ${n(bottom)}H${n(x0)}z`,
		trip: rect(bar, y - (row - 1) / 2, barWidth, row - 1),
		open: '',
		fade: [],
		right: bar + barWidth
	};
}

/** Round, radius h/2. */
function heldEnd({ x0, x1, y, h }: StrokeInput): StrokeShape {
	const [r, rx] = [h / 2, Math.min(h / 2, x1 - x0)];
	const ink = `M${n(x0)} ${n(y - r)}H${n(x1 - rx)}a${n(rx)} ${n(r)} 0 0 1 0 ${n(h)}H${n(x0)}z`;
	return { ink, trip: '', open: '', fade: [], right: x1 };
}

/** An open square of side h + 2 around a 1.5 line. */
function calledOffEnd({ x0, x1, y, h }: StrokeInput): StrokeShape {
	const side = h + 2;
	const left = Math.max(x1 - side, x0);
	const inner = side - 1.5;
	return {
		ink: left > x0 ? rect(x0, y - h / 2, left - x0, h) : '',
		trip: '',
		open: rect(left + 0.75, y - inner / 2, inner, inner),
		fade: [],
		right: left + side
	};
}

/** The last 4.3 h fade to 8 %; a lost run leaves three dots, an unclear one none. */
function fadingEnd({ x0, x1, y, h }: StrokeInput, dots: boolean): StrokeShape {
	const length = Math.min(4.3 * h, x1 - x0);
	const from = x1 - length;
	const slice = length / FADE_SLICES;
	const fade = Array.from({ length: FADE_SLICES }, (_, i) => ({
		path: rect(from + i * slice, y - h / 2, slice, h),
		opacity: Math.round((1 - ((1 - FADE_END) * (i + 0.5)) / FADE_SLICES) * 100) / 100
	}));
	let ink = from > x0 ? rect(x0, y - h / 2, from - x0, h) : '';
	if (dots) for (let i = 0; i < 3; i++) ink += disc(x1 + 0.8 * h * (i + 0.75), y, 0.2 * h * (1 - 0.2 * i));
	return { ink, trip: '', open: '', fade, right: dots ? x1 + 0.8 * h * 2.75 : x1 };
}

/** A stroke in outline: a run that is known without a trend log. */
export function hollow(shape: StrokeShape): StrokeShape {
	return { ...shape, ink: '', open: shape.ink + shape.open };
}

/** Several strokes as one: parts are joined, so that a whole miniature is four elements. */
export function joinStrokes(shapes: readonly StrokeShape[]): StrokeShape {
	const joined: StrokeShape = { ink: '', trip: '', open: '', fade: [], right: 0 };
	const slices = new Map<number, string>();
	for (const shape of shapes) {
		joined.ink += shape.ink;
		joined.trip += shape.trip;
		joined.open += shape.open;
		joined.right = Math.max(joined.right, shape.right);
		for (const { path, opacity } of shape.fade) slices.set(opacity, (slices.get(opacity) ?? '') + path);
	}
	joined.fade = [...slices].map(([opacity, path]) => ({ path, opacity }));
	return joined;
}
