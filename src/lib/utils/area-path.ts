import { lowerBound, type Plane, type Readings } from './trace-path';

const n = (value: number): number => Math.round(value * 100) / 100;

/** Where the straight line between two readings meets a level. */
function meeting(t0: number, v0: number, t1: number, v1: number, level: number): number {
	return t0 + ((level - v0) / (v1 - v0)) * (t1 - t0);
}

/**
 * The paper between a trace and a level where the trace is below it, as closed SVG path data (the hatch under a cut-out).
 * Gap rule: NaN closes the area; nothing is filled across a gap. Held values are filled as steps.
 */
export function areaBelow(
	readings: Readings,
	level: number,
	plane: Plane,
	window: { from: number; to: number },
	hold = false
): string {
	const { t, v } = readings;
	const end = Math.min(t.length, lowerBound(t, window.to) + 1);
	const floor = n(plane.y(level));
	let path = '';
	let open = false;
	const close = (at: number) => {
		if (open) path += `L${n(plane.x(at))} ${floor}Z`;
		open = false;
	};
	for (let i = Math.max(0, lowerBound(t, window.from) - 1); i < end; i++) {
		const at = t[i] ?? 0;
		const value = v[i] ?? Number.NaN;
		const lastAt = t[i - 1] ?? at;
		const last = v[i - 1] ?? Number.NaN;
		if (Number.isNaN(value)) {
			close(hold ? at : lastAt);
			continue;
		}
		if (open && hold) path += `L${n(plane.x(at))} ${n(plane.y(last))}`;
		if (value < level) {
			if (!open) {
				const begin = Number.isNaN(last) || hold || last < level ? at : meeting(lastAt, last, at, value, level);
				path += `M${n(plane.x(begin))} ${floor}`;
				open = true;
			}
			path += `L${n(plane.x(at))} ${n(plane.y(value))}`;
		} else if (open) close(hold ? at : meeting(lastAt, last, at, value, level));
	}
	if (open) close(t[end - 1] ?? 0);
	return path;
}

/** A band given by its two edges, as closed path data; a missing edge (null) closes a piece. */
export function bandPath(
	x: readonly number[],
	low: readonly (number | null)[],
	high: readonly (number | null)[],
	y: (value: number) => number
): string {
	let path = '';
	let begin = -1;
	const close = (end: number) => {
		if (begin < 0) return;
		const over = [];
		const under = [];
		for (let i = begin; i < end; i++) {
			over.push(`${n(x[i] ?? 0)} ${n(y(high[i] ?? 0))}`);
			under.unshift(`${n(x[i] ?? 0)} ${n(y(low[i] ?? 0))}`);
		}
		path += `M${[...over, ...under].join('L')}Z`;
		begin = -1;
	};
	for (let i = 0; i < x.length; i++) {
		const whole = low[i] !== null && low[i] !== undefined && high[i] !== null && high[i] !== undefined;
		if (whole && begin < 0) begin = i;
		if (!whole) close(i);
	}
	close(x.length);
	return path;
}
