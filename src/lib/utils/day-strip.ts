import type { DayStrip, Stroke } from '../model/wire/views';
import { clockX, type DayClock } from './day-clock';
import { hollow, strokeShape, type StrokeShape } from './stroke-geometry';

/** One day's strokes as shapes, in the order they are drawn: trips last, so that none hides under a neighbour. */
export function stripShapes(
	day: Pick<DayStrip, 'strokes'>,
	clock: DayClock,
	y: number,
	h: number,
	row: number
): { stroke: Stroke; x0: number; shape: StrokeShape }[] {
	return [...day.strokes]
		.sort((a, b) => Number(a.outcome === 'tripped') - Number(b.outcome === 'tripped') || a.from - b.from)
		.map((stroke) => {
			const x0 = clockX(clock, stroke.from);
			const shape = strokeShape({
				x0,
				x1: clockX(clock, stroke.to),
				y,
				h,
				row,
				outcome: stroke.outcome,
				goesOn: stroke.goesOn
			});
			// Without a trend log a run is an outline: it is known, but nothing of it was drawn by a machine.
			return { stroke, x0, shape: stroke.noted ? hollow(shape) : shape };
		});
}

/** Stretches of a day without a log: what `logged` leaves of 0…`end`. Slivers under 10 min are not worth a mark. */
export function unlogged(day: Pick<DayStrip, 'logged'>, end = 1440): [number, number][] {
	const bare: [number, number][] = [];
	let at = 0;
	for (const [from, to] of [...day.logged].sort((a, b) => a[0] - b[0])) {
		bare.push([at, Math.min(from, end)]);
		at = Math.max(at, to);
	}
	bare.push([at, end]);
	return bare.filter(([from, to]) => to - from >= 10);
}

/** Where a day's paper ends for "no log": today at the present minute, since what has not been is not missing. */
export function loggableUntil(date: string, now: { date: string; minute: number } | null): number {
	if (now === null || date < now.date) return 1440;
	return date === now.date ? now.minute : 0;
}

/** Is there a log for nearly all of the day up to `until`, and no run in it? */
export function notRun(day: Pick<DayStrip, 'strokes' | 'logged'>, until = 1440): boolean {
	return day.strokes.length === 0 && until > 0 && unlogged(day, until).length === 0;
}

/** Path of short bars, 1 wide and 3 apart, that fill `from`…`to` px around `y`: "no log". */
export function barsPath(from: number, to: number, y: number, height: number): string {
	let path = '';
	for (let x = Math.ceil(from); x < to - 0.5; x += 4) path += `M${x + 0.5} ${y - height / 2}v${height}`;
	return path;
}

/** The last minute any day of a list needs: 1440, or 1500 where a day has 25 hours. */
export function dayEnd(days: readonly Pick<DayStrip, 'strokes' | 'logged'>[]): number {
	let end = 1440;
	for (const day of days) {
		for (const stroke of day.strokes) end = Math.max(end, stroke.to);
		for (const [, to] of day.logged) end = Math.max(end, to);
	}
	return Math.min(end, 1500);
}
