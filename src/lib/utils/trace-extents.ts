import { lowerBound, type Readings } from './trace-path';

/** What a trace covers in each pixel column, px from the top; `top` above `bottom` never, both NaN where bare. */
export type Extents = { top: Float32Array; bottom: Float32Array };

/** An extents record of `width` bare columns. */
export function bareExtents(width: number): Extents {
	const columns = Math.max(0, Math.ceil(width)) + 1;
	return { top: new Float32Array(columns).fill(Number.NaN), bottom: new Float32Array(columns).fill(Number.NaN) };
}

/** Covers `y` in column `x`; columns outside are left alone. */
function cover(extents: Extents, x: number, y: number): void {
	if (x < 0 || x >= extents.top.length) return;
	const top = extents.top[x] ?? Number.NaN;
	const bottom = extents.bottom[x] ?? Number.NaN;
	if (!(top <= y)) extents.top[x] = y;
	if (!(bottom >= y)) extents.bottom[x] = y;
}

/** Covers the line from (x0, y0) to (x1, y1), x0 ≤ x1, column by column. */
export function coverLine(extents: Extents, x0: number, y0: number, x1: number, y1: number): void {
	const first = Math.max(0, Math.floor(x0));
	const last = Math.min(extents.top.length - 1, Math.ceil(x1));
	const slope = x1 > x0 ? (y1 - y0) / (x1 - x0) : 0;
	for (let x = first; x <= last; x++) {
		const left = Math.min(Math.max(x - 0.5, x0), x1);
		const right = Math.max(Math.min(x + 0.5, x1), x0);
		cover(extents, x, y0 + slope * (left - x0));
		cover(extents, x, y0 + slope * (right - x0));
	}
	if (x1 === x0) {
		cover(extents, first, y0);
		cover(extents, first, y1);
	}
}

/**
 * The columns a drawn trace covers; used to keep labels off it. Gap rule: NaN covers nothing.
 * @param x px of an instant (ms UTC), rising
 * @param y px of a value
 */
export function traceExtents(
	readings: Readings,
	x: (ms: number) => number,
	y: (value: number) => number,
	window: { from: number; to: number },
	width: number,
	step = false
): Extents {
	const extents = bareExtents(width);
	const { t, v } = readings;
	const end = Math.min(t.length, lowerBound(t, window.to) + 1);
	let lastX = Number.NaN;
	let lastY = Number.NaN;
	for (let i = Math.max(0, lowerBound(t, window.from) - 1); i < end; i++) {
		const value = v[i] ?? Number.NaN;
		const px = x(t[i] ?? 0);
		const py = Number.isNaN(value) ? Number.NaN : y(value);
		if (!Number.isNaN(lastY) && step) coverLine(extents, lastX, lastY, px, lastY);
		if (!Number.isNaN(py)) {
			if (Number.isNaN(lastY)) coverLine(extents, px, py, px, py);
			else coverLine(extents, step ? px : lastX, lastY, px, py);
		}
		lastX = px;
		lastY = py;
	}
	return extents;
}
