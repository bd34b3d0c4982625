import { inkOf } from '$lib/components/charts/trace-style';
import { type Box, placeLabels, placesAlong, placesAtLevel, type LabelWish } from '$lib/utils/label-placement';
import { bareExtents, coverLine, type Extents } from '$lib/utils/trace-extents';
import { textWidth } from '$lib/utils/text-width';
import type { DrawnTrace, StripDrawing } from './strip-drawing';

/** A label in its place: text box in px, ink, and what its last word links to. */
export type StripLabel = Box & {
	key: string;
	text: string;
	ink: string;
	weight: number;
	/** Where a limit comes from; printed after the text, underlined. */
	provenance?: string;
};

/** A dimension line: an upright with arrows between two traces, and its figure. */
export type Dimension = { key: string; x: number; top: number; bottom: number; text: string };

export type LabelInput = {
	drawing: StripDrawing;
	width: number;
	height: number;
	startX: number;
	/** Uprights no label may stand on: start, trip, stop, the change of paper speed. */
	uprights: readonly number[];
	/** Prints a stored value of this strip's axis. */
	print: (stored: number) => string;
	dimensions: readonly Dimension[];
	/** A ring on a trace and its words: where the first mover left the band. */
	ring?: { x: number; y: number; text: string } | null;
	/** More words for the strip, tried at the upright they name (the trip in the first strip of a phone). */
	flag?: { x: number; text: string } | null;
};

const HEIGHT = 14;

type Wish = LabelWish & Omit<StripLabel, keyof Box | 'key'>;

function traceWish(trace: DrawnTrace, input: LabelInput, text: string): Wish {
	const size = { width: textWidth(text), height: HEIGHT };
	const ghost = trace.role === 'ghost';
	const places = placesAlong(trace.extents, size, { width: input.width, startX: input.startX }, ghost);
	const ink = ghost ? inkOf(trace.family) : trace.ink;
	return { key: `${trace.startId}:${trace.key}`, ...size, places, text, ink, weight: ghost ? 500 : 600 };
}

/** Own traces first, then limits, dimensions and marks, then the ghosts: what matters gets the paper. */
function wishesOf(input: LabelInput): Wish[] {
	const { drawing, width, print } = input;
	const own = drawing.traces.filter(({ role }) => role === 'own').map((t) => traceWish(t, input, t.label));
	const ghosts = drawing.traces.filter(({ role }) => role === 'ghost');
	const several = new Set(ghosts.map(({ key }) => key)).size > 1;
	const ghostWishes = ghosts.map((t) => traceWish(t, input, several ? `${ownLabel(drawing, t)}, ${t.label}` : t.label));
	const faint = drawing.traces.filter(({ role }) => role === 'faint').map((t) => traceWish(t, input, t.label));
	const limits = drawing.limits.map((limit): Wish => {
		const text = `${limit.name} ${print(limit.stored)},`;
		const size = { width: textWidth(`${text} ${limit.provenance}`, 12, 'words', 500), height: HEIGHT };
		const ink = limit.kind === 'trip' ? 'var(--trip)' : 'var(--ink2)';
		const places = placesAtLevel(limit.y, size, { width });
		return { key: `limit:${limit.key}`, ...size, places, text, ink, weight: 500, provenance: limit.provenance };
	});
	return [...marks(input), ...own, ...limits, ...bandWish(input), ...ghostWishes, ...faint];
}

/** The words of the start's own trace of the same signal, or the ghost's signal when the start has none. */
function ownLabel(drawing: StripDrawing, ghost: DrawnTrace): string {
	return drawing.traces.find(({ key, role }) => key === ghost.key && role !== 'ghost')?.label ?? ghost.key;
}

function bandWish({ drawing, width, print }: LabelInput): Wish[] {
	const { band } = drawing;
	if (!band) return [];
	const text = `${band.name} ${print(band.low).replace(/\s.*/, '')}–${print(band.high)},`;
	const size = { width: textWidth(`${text} ${band.provenance}`, 12, 'words', 500), height: HEIGHT };
	const middle = (band.top + band.bottom) / 2;
	const places = [middle - HEIGHT / 2, band.bottom + 2, band.top - HEIGHT - 2].flatMap((y) =>
		placesAtLevel(y + HEIGHT + 1.5, size, { width }).filter((place) => Math.abs(place.y - y) < 1)
	);
	return [{ key: 'band', ...size, places, text, ink: 'var(--ink2)', weight: 500, provenance: band.provenance }];
}

function marks({ dimensions, ring, flag, height, width }: LabelInput): Wish[] {
	const wishes: Wish[] = [];
	if (flag) {
		const size = { width: textWidth(flag.text), height: HEIGHT };
		const xs = [flag.x - size.width - 5, flag.x + 5];
		const places = [2, height - HEIGHT - 2, height / 2].flatMap((y) => xs.map((x) => ({ x, y })));
		wishes.push({ key: 'flag', ...size, places, text: flag.text, ink: 'var(--trip)', weight: 600 });
	}
	for (const { key, x, top, bottom, text } of dimensions) {
		const size = { width: textWidth(text, 12, 'words', 600), height: HEIGHT };
		const middle = (top + bottom) / 2 - HEIGHT / 2;
		const ys = [middle, top - HEIGHT - 2, bottom + 2];
		const places = ys.flatMap((y) => [
			{ x: x + 6, y },
			{ x: x - 6 - size.width, y }
		]);
		wishes.push({ key, ...size, places, text, ink: 'var(--ink)', weight: 600 });
	}
	if (ring) {
		const size = { width: textWidth(ring.text, 12, 'words', 500), height: HEIGHT };
		const ys = [ring.y + 8, ring.y - HEIGHT - 8, ring.y - HEIGHT / 2, height - HEIGHT - 2, 2];
		const xs = [ring.x + 9, Math.min(ring.x + 9, width - size.width - 4), ring.x - size.width - 9];
		const places = ys.flatMap((y) => xs.map((x) => ({ x, y })));
		wishes.push({ key: 'ring', ...size, places, text: ring.text, ink: 'var(--ink)', weight: 500 });
	}
	return wishes;
}

/** Dimension lines and rings stand on the paper too: no label runs across them. */
function standing({ dimensions, ring, width }: LabelInput): Extents[] {
	const extents = bareExtents(width);
	for (const { x, top, bottom } of dimensions) coverLine(extents, Math.round(x), top, Math.round(x), bottom);
	if (ring)
		for (let dx = -5; dx <= 5; dx++)
			coverLine(extents, Math.round(ring.x + dx), ring.y - 5, Math.round(ring.x + dx), ring.y + 5);
	return [extents];
}

/** The labels of a strip that found free paper, in their places. */
export function labelStrip(input: LabelInput): StripLabel[] {
	const wishes = wishesOf(input);
	const ground = {
		width: input.width,
		height: input.height,
		traces: [...input.drawing.traces.map(({ extents }) => extents), ...standing(input)],
		uprights: input.uprights,
		levels: input.drawing.limits.map(({ y }) => y),
		// Words on a hatch are hard to read, and say nothing of what is not there.
		taken: input.drawing.gaps.map(({ x, width }) => ({ x, y: 0, width, height: input.height }))
	};
	const placed = placeLabels(wishes, ground);
	return wishes.flatMap(({ key, text, ink, weight, provenance }) => {
		const box = placed.get(key);
		return box ? [{ key, text, ink, weight, ...box, ...(provenance ? { provenance } : {}) }] : [];
	});
}
