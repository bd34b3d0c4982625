import type { Days, Pin } from '$lib/model/wire/views';
import { dayParts } from '$lib/utils/clock';

export type Day = Days['days'][number];

/** Where a day or a pin stands on the sheet, px from the top of the plot. */
export type DayRow = { kind: 'day'; day: Day; y: number; height: number; weekBegins: boolean };
export type PinRow = { kind: 'pin'; pin: Pin; y: number; height: number };
export type LaidOut = { rows: (DayRow | PinRow)[]; height: number };

export type LayoutOptions = {
	/** Height of a day with runs or without a log. */
	row: number;
	/** Height of a day that has neither; the same as `row` on wide sheets. */
	idleRow: number;
	/** Paper before each Monday. */
	weekGap: number;
	pin: number;
	newestFirst: boolean;
};

/**
 * Lays days and the pins between them from top to bottom. A pin of a day stands after that day's runs: below it on
 * sheets that read downwards in time, above it on those that begin with today.
 */
export function layDays(days: readonly Day[], pins: readonly Pin[], options: LayoutOptions): LaidOut {
	const ordered = options.newestFirst ? [...days].reverse() : days;
	const rows: (DayRow | PinRow)[] = [];
	let y = 0;
	const addPins = (date: string) => {
		const own = pins.filter((pin) => pin.date === date).sort((a, b) => a.at.localeCompare(b.at));
		for (const pin of options.newestFirst ? own.reverse() : own) {
			rows.push({ kind: 'pin', pin, y, height: options.pin });
			y += options.pin;
		}
	};
	ordered.forEach((day, i) => {
		const weekday = dayParts(day.date).weekday;
		const weekBegins = i > 0 && weekday === (options.newestFirst ? 'Sun' : 'Mon');
		if (weekBegins) y += options.weekGap;
		if (options.newestFirst) addPins(day.date);
		const idle = day.strokes.length === 0;
		const height = idle ? options.idleRow : options.row;
		rows.push({ kind: 'day', day, y, height, weekBegins });
		y += height;
		if (!options.newestFirst) addPins(day.date);
	});
	return { rows, height: y };
}

/** The hour of the clock that wide paper widens: around the cluster of trips, else where first runs begin. */
export function wideHour(days: Pick<Days, 'days' | 'cluster'>): { from: number; to: number } {
	const { cluster } = days;
	if (cluster !== null) {
		const from = Math.max(0, Math.floor((cluster.from - 5) / 15) * 15);
		return { from, to: Math.min(1440, Math.max(from + 60, Math.ceil((cluster.to + 10) / 15) * 15)) };
	}
	const firsts = days.days
		.flatMap((day) => day.strokes.filter((stroke) => !stroke.beganBefore).slice(0, 1))
		.map((stroke) => stroke.from)
		.sort((a, b) => a - b);
	const middle = firsts[Math.floor(firsts.length / 2)] ?? 360;
	const from = Math.min(Math.floor(Math.max(middle - 15, 0) / 30) * 30, 1380);
	return { from, to: from + 60 };
}

/** Does any run touch the clock before a minute of the day? */
export function runsBefore(days: readonly Pick<Day, 'strokes'>[], minute: number): boolean {
	return days.some((day) => day.strokes.some((stroke) => stroke.from < minute));
}
