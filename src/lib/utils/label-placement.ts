import type { Extents } from './trace-extents';

export type Box = { x: number; y: number; width: number; height: number };

/** Where a label wants to be, best place first, each by its upper left corner. */
export type LabelWish = {
	key: string;
	width: number;
	height: number;
	places: readonly { x: number; y: number }[];
};

export type LabelGround = {
	width: number;
	height: number;
	/** What the traces cover. */
	traces: readonly Extents[];
	/** Upright lines through the strip (start, trip), px. */
	uprights: readonly number[];
	/** Level lines right across the strip (limits), px. */
	levels?: readonly number[];
	/** Boxes already taken. */
	taken?: readonly Box[];
};

const TRACE_CLEARANCE = 2;
const LINE_CLEARANCE = 3;
const EDGE = 2;

function overlaps(a: Box, b: Box, clear = 2): boolean {
	return (
		a.x < b.x + b.width + clear &&
		b.x < a.x + a.width + clear &&
		a.y < b.y + b.height + clear &&
		b.y < a.y + a.height + clear
	);
}

/** Does a trace run through the box, or closer to it than the clearance? */
export function crossesTrace(box: Box, trace: Extents, clear = TRACE_CLEARANCE): boolean {
	const first = Math.max(0, Math.floor(box.x - clear));
	const last = Math.min(trace.top.length - 1, Math.ceil(box.x + box.width + clear));
	const above = box.y - clear;
	const below = box.y + box.height + clear;
	for (let column = first; column <= last; column++) {
		// NaN compares false: a bare column is free paper.
		if ((trace.top[column] ?? Number.NaN) < below && (trace.bottom[column] ?? Number.NaN) > above) return true;
	}
	return false;
}

/** Is the box on free paper: inside the strip and off every trace, line and other label? */
export function isFree(box: Box, ground: LabelGround, taken: readonly Box[]): boolean {
	if (box.x < EDGE || box.x + box.width > ground.width - EDGE) return false;
	if (box.y < 0 || box.y + box.height > ground.height) return false;
	const nearUpright = (x: number) => x > box.x - LINE_CLEARANCE && x < box.x + box.width + LINE_CLEARANCE;
	if (ground.uprights.some(nearUpright)) return false;
	if ((ground.levels ?? []).some((y) => y > box.y - 1 && y < box.y + box.height + 1)) return false;
	if (taken.some((other) => overlaps(box, other))) return false;
	return !ground.traces.some((trace) => crossesTrace(box, trace));
}

/**
 * Puts labels on free paper, in the order given (so give the ones that matter first). Each takes the first of its places
 * that touches no trace, line or label; one that finds none is dropped, never laid over something.
 * @returns the boxes of the labels that found room, by key
 */
export function placeLabels(wishes: readonly LabelWish[], ground: LabelGround): Map<string, Box> {
	const taken = [...(ground.taken ?? [])];
	const placed = new Map<string, Box>();
	for (const { key, width, height, places } of wishes) {
		for (const place of places) {
			const box = { ...place, width, height };
			if (!isFree(box, ground, taken)) continue;
			placed.set(key, box);
			taken.push(box);
			break;
		}
	}
	return placed;
}

/** Least top and greatest bottom of a trace over a stretch of columns; null where it is bare throughout. */
function reach(trace: Extents, from: number, to: number): { top: number; bottom: number } | null {
	let top = Infinity;
	let bottom = -Infinity;
	const last = Math.min(trace.top.length - 1, Math.ceil(to));
	for (let column = Math.max(0, Math.floor(from)); column <= last; column++) {
		const highest = trace.top[column] ?? Number.NaN;
		const lowest = trace.bottom[column] ?? Number.NaN;
		if (highest < top) top = highest;
		if (lowest > bottom) bottom = lowest;
	}
	return top <= bottom ? { top, bottom } : null;
}

/**
 * Places for the label of a trace: above or below the line before the start, then above it, then below it, walking along
 * the columns it covers. With `fromRight` the walk begins at the right end (ghosts, which run on after a trip).
 */
export function placesAlong(
	trace: Extents,
	size: { width: number; height: number },
	ground: { width: number; startX: number },
	fromRight = false
): { x: number; y: number }[] {
	const gap = TRACE_CLEARANCE + 1;
	const xs: number[] = [];
	for (let x = 6; x + size.width < ground.width; x += 14) xs.push(x);
	if (fromRight) xs.reverse();
	const before = xs.filter((x) => x + size.width < ground.startX - LINE_CLEARANCE);
	const after = xs.filter((x) => x > ground.startX);
	const hung = (x: number): { above: number; below: number } | null => {
		const over = reach(trace, x - gap, x + size.width + gap);
		return over === null ? null : { above: over.top - gap - size.height, below: over.bottom + gap };
	};
	const at = (list: number[], side: 'above' | 'below') =>
		list.flatMap((x) => {
			const hang = hung(x);
			return hang === null ? [] : [{ x, y: hang[side] }];
		});
	const first = fromRight ? [] : [...at(before, 'above'), ...at(before, 'below')];
	return [...first, ...at(after, 'above'), ...at(after, 'below')];
}

/** Places for the label of a level line: above then below it, from the right end leftwards. */
export function placesAtLevel(
	y: number,
	size: { width: number; height: number },
	ground: { width: number }
): { x: number; y: number }[] {
	const places: { x: number; y: number }[] = [];
	for (let x = ground.width - size.width - 6; x > 4; x -= 16)
		places.push({ x, y: y - size.height - 1.5 }, { x, y: y + 1.5 });
	return places;
}
