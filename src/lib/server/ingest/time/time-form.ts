import type { DateOrder } from '../types';
import { readClock, StampReader } from './stamp';

/** How well a column's cells read as stamps, and in which orders. */
export type ColumnTime = {
	/** Share of the cells that are not blank which read in the best order. */
	share: number;
	/** Every order in which as many cells read as in the best, best first. */
	orders: DateOrder[];
	hasClock: boolean;
	hasYear: boolean;
	carriesZone: boolean;
	twelveHour: boolean;
	monthNames: boolean;
};

const CALENDAR: readonly DateOrder[] = ['ymd', 'dmy', 'mdy'];
const YEARLESS: readonly DateOrder[] = ['md', 'dm'];

type Reading = { hits: number; clock: number; zone: number; half: number; year: number };

function tryOrder(cells: readonly string[], order: DateOrder): Reading {
	const reader = new StampReader(order, null);
	const r: Reading = { hits: 0, clock: 0, zone: 0, half: 0, year: 0 };
	for (const cell of cells) {
		if (!reader.readText(cell)) continue;
		r.hits++;
		if (reader.out.hasClock) r.clock++;
		if (!Number.isNaN(reader.out.offset)) r.zone++;
		if (reader.out.twelveHour) r.half++;
		if (reader.out.hasYear) r.year++;
	}
	return r;
}

function described(cells: readonly string[], orders: DateOrder[], r: Reading): ColumnTime {
	const most = r.hits / 2;
	return {
		share: r.hits / cells.length,
		orders,
		hasClock: r.clock > most,
		hasYear: r.year > most,
		carriesZone: r.zone > most,
		twelveHour: r.half > 0,
		monthNames: cells.slice(0, 5).some((c) => /[a-zà-ÿ]{3}/i.test(c.replace(/[ap]\.?m\b|utc|gmt|[a-z]{2,3}t\b/gi, '')))
	};
}

/** Epochs and spreadsheet serials look like measured numbers, so they count only where they rise within sane years. */
function numberOrder(cells: readonly string[], now: number): DateOrder | null {
	const n = cells.map((c) => Number(c.trim().replace(',', '.')));
	if (n.some((x) => !Number.isFinite(x))) return null;
	const [least, most] = [Math.min(...n), Math.max(...n)];
	const within = (scale: number, zero: number) => least * scale + zero > 9.4e11 && most * scale + zero < now + 1e9;
	if (within(1000, 0)) return 'epoch-s';
	if (within(1, 0)) return 'epoch-ms';
	if (least > 30_000 && within(86_400_000, Date.UTC(1899, 11, 30))) return 'serial';
	return null;
}

function mostlyMonotonic(cells: readonly string[]): boolean {
	let up = 0;
	let down = 0;
	for (let i = 1; i < cells.length; i++) {
		const step = Number(cells[i]?.replace(',', '.')) - Number(cells[i - 1]?.replace(',', '.'));
		if (step > 0) up++;
		else if (step < 0) down++;
	}
	return cells.length < 3 || (up + down > 0 && Math.min(up, down) <= 0.1 * (up + down));
}

/**
 * How a column's cells read as time. Blank cells are passed over; null when fewer than `least` of the rest read.
 * @param numeric whether plain numbers may be epochs or serials (the column's name or place allows it)
 */
export function columnTime(cells: readonly string[], now: number, numeric: boolean, least = 0.8): ColumnTime | null {
	const filled = cells.filter((c) => c.trim() !== '');
	if (filled.length === 0) return null;
	if (numeric) {
		const numbers = filled.filter((c) => /^\s*\d+([.,]\d*)?\s*$/.test(c));
		if (numbers.length >= least * filled.length && numbers.every((c) => !/^\s*\d{8}\s*$/.test(c) || Number(c) > 3e7)) {
			const order = numberOrder(numbers, now);
			if (order && mostlyMonotonic(numbers)) return described(filled, [order], tryOrder(filled, order));
		}
	}
	for (const family of [CALENDAR, YEARLESS]) {
		const tried = family.map((order) => ({ order, reading: tryOrder(filled, order) }));
		const best = tried.reduce((a, b) => (b.reading.hits > a.reading.hits ? b : a));
		if (best.reading.hits < least * filled.length || best.reading.hits === 0) continue;
		const equal = tried.filter((t) => t.reading.hits === best.reading.hits).map((t) => t.order);
		const out = described(filled, equal, best.reading);
		if (out.monthNames) out.orders = [equal[0] ?? best.order];
		return out;
	}
	return null;
}

/** Share of the cells that are not blank which are a clock without a date. */
export function clockShare(cells: readonly string[]): number {
	const filled = cells.filter((c) => c.trim() !== '');
	if (filled.length === 0) return 0;
	return filled.filter((c) => !Number.isNaN(readClock(c))).length / filled.length;
}

/**
 * Which of two orders makes a quieter log: steps backwards and leaps over 20 days between neighbouring rows.
 * Rows come in the log's order. Lower is better.
 */
export function unrest(cells: readonly string[], order: DateOrder, now: number): number {
	const reader = new StampReader(order, new Date(now).getUTCFullYear());
	let before = NaN;
	let back = 0;
	let forth = 0;
	let leaps = 0;
	for (const cell of cells) {
		if (!reader.readText(cell)) continue;
		const { wall } = reader.out;
		if (wall > now + 3 * 86_400_000) leaps += 1;
		if (wall < before) back++;
		else if (wall > before) forth++;
		if (Math.abs(wall - before) > 20 * 86_400_000) leaps++;
		before = wall;
	}
	return Math.min(back, forth) + leaps;
}
