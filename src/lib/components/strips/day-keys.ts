import type { Stroke } from '$lib/model/wire/views';
import type { DayRow } from './day-layout';

/** A start on the sheet, for keys and pointers to go between. */
export type Spot = { stroke: Stroke; row: number };

/** Every start of the sheet in the order it reads: row by row, by the clock. A run from yesterday is yesterday's. */
export function spotsOf(rows: readonly DayRow[]): Spot[] {
	return rows.flatMap((row, i) =>
		row.day.strokes
			.filter((stroke) => !stroke.beganBefore)
			.sort((a, b) => a.from - b.from)
			.map((stroke) => ({ stroke, row: i }))
	);
}

/**
 * Where an arrow key leads: left and right along time, up and down to the start of the nearest day in that direction
 * whose clock is nearest. Null where there is nothing to go to, or for other keys.
 */
export function nextSpot(spots: readonly Spot[], at: string, key: string): Spot | null {
	const index = spots.findIndex((spot) => spot.stroke.startId === at);
	const here = spots[index];
	if (here === undefined) return null;
	if (key === 'Home') return spots[0] ?? null;
	if (key === 'End') return spots.at(-1) ?? null;
	if (key === 'ArrowLeft') return spots[index - 1] ?? null;
	if (key === 'ArrowRight') return spots[index + 1] ?? null;
	if (key !== 'ArrowUp' && key !== 'ArrowDown') return null;
	const step = key === 'ArrowDown' ? 1 : -1;
	const beyond = spots.filter((spot) => (spot.row - here.row) * step > 0);
	const rows = beyond.map((spot) => spot.row);
	const row = step > 0 ? Math.min(...rows) : Math.max(...rows);
	return nearest(
		beyond.filter((spot) => spot.row === row),
		here.stroke.from
	);
}

/** The start of a row that a tap at a minute means: the one whose run holds it, else the nearest end. */
export function nearest(spots: readonly Spot[], minute: number): Spot | null {
	let best: Spot | null = null;
	let least = Infinity;
	for (const spot of spots) {
		const { from, to } = spot.stroke;
		const distance = minute < from ? from - minute : minute > to ? minute - to : 0;
		if (distance < least) [best, least] = [spot, distance];
	}
	return best;
}
