/** Readings to draw: `t` ms UTC in order, `v` as drawn, NaN = no reading. */
export type Readings = { t: ArrayLike<number>; v: ArrayLike<number> };
export type Plane = { x: (ms: number) => number; y: (value: number) => number };

const round = (n: number): number => Math.round(n * 100) / 100;

/** Index of the first reading at or after `at` (binary search); the length when there is none. */
export function lowerBound(t: ArrayLike<number>, at: number): number {
	let low = 0;
	let high = t.length;
	while (low < high) {
		const mid = (low + high) >>> 1;
		if ((t[mid] ?? Infinity) < at) low = mid + 1;
		else high = mid;
	}
	return low;
}

/** Readings to draw between two instants: one more at either side, so that the line runs off the paper. */
function drawnRange(t: ArrayLike<number>, from: number, to: number): [number, number] {
	return [Math.max(0, lowerBound(t, from) - 1), Math.min(t.length, lowerBound(t, to) + 1)];
}

/**
 * The trace as SVG path data. Gap rule: a NaN lifts the pen, and so does more than `lift` ms between two readings;
 * nothing is drawn across. `step` holds each reading to the next (change-of-value logs).
 * @param lift ms between readings that count as a gap; Infinity where the readings themselves mark their gaps
 */
export function tracePath(
	readings: Readings,
	plane: Plane,
	window: { from: number; to: number },
	{ step = false, lift = Infinity }: { step?: boolean; lift?: number } = {}
): string {
	const { t, v } = readings;
	const [begin, end] = drawnRange(t, window.from, window.to);
	let path = '';
	let down = false;
	let last = 0;
	for (let i = begin; i < end; i++) {
		const at = t[i] ?? 0;
		const value = v[i] ?? Number.NaN;
		if (Number.isNaN(value)) {
			// A held value lasts until the break, not only until its own record.
			if (down && step) path += `H${round(plane.x(at))}`;
			down = false;
			continue;
		}
		const x = round(plane.x(at));
		const y = round(plane.y(value));
		if (!down || at - last > lift) path += `M${x} ${y}`;
		else path += step ? `H${x}V${y}` : `L${x} ${y}`;
		down = true;
		last = at;
	}
	return path;
}

/** Readings that stand alone between two breaks: a line cannot show them, so they are drawn as dots. */
export function lonePoints(readings: Readings, plane: Plane, window: { from: number; to: number }): [number, number][] {
	const { t, v } = readings;
	const [begin, end] = drawnRange(t, window.from, window.to);
	const points: [number, number][] = [];
	for (let i = begin; i < end; i++) {
		const value = v[i] ?? Number.NaN;
		if (Number.isNaN(value)) continue;
		const alone = Number.isNaN(v[i - 1] ?? Number.NaN) && Number.isNaN(v[i + 1] ?? Number.NaN);
		if (alone) points.push([round(plane.x(t[i] ?? 0)), round(plane.y(value))]);
	}
	return points;
}

/**
 * The readings themselves as dots, where they lie at least `apart` px from each other: coarse sampling shows its points.
 * Empty when the readings are closer, or fewer than two are in the window.
 */
export function samplePoints(
	readings: Readings,
	plane: Plane,
	window: { from: number; to: number },
	apart = 9
): [number, number][] {
	const { t, v } = readings;
	const begin = lowerBound(t, window.from);
	const end = lowerBound(t, window.to + 1);
	const points: [number, number][] = [];
	let lastX = -Infinity;
	for (let i = begin; i < end; i++) {
		const value = v[i] ?? Number.NaN;
		if (Number.isNaN(value)) continue;
		const x = round(plane.x(t[i] ?? 0));
		if (x - lastX < apart) continue;
		// Only where both neighbours are as far away: a fast stretch stays a line.
		const next = plane.x(t[i + 1] ?? Infinity);
		if (next - x >= apart) points.push([x, round(plane.y(value))]);
		lastX = x;
	}
	return points.length < 2 ? [] : points;
}
