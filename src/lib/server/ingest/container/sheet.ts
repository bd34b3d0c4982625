import readWorkbook from 'read-excel-file/node';
import { LogRefusal } from '../types';
import type { ByteStore } from './byte-store';
import { zipStream, type ZipEntry } from './zip';

/** A workbook is held in memory while it is read, so its size is bounded. */
const MOST_PACKED = 64 * 1024 * 1024;
const MOST_UNPACKED = 512 * 1024 * 1024;

type Cell = string | number | boolean | Date | null;

/** Measures every part by unpacking it: the sizes an archive states may be lies. */
async function refuseBombs(store: ByteStore, entries: readonly ZipEntry[], file: string): Promise<void> {
	let total = 0;
	if (store.size > MOST_PACKED) throw tooLarge(file);
	for (const entry of entries) {
		for await (const chunk of zipStream(store, entry, file)) {
			total += chunk.length;
			if (total > MOST_UNPACKED) throw tooLarge(file);
		}
	}
}

function tooLarge(file: string): LogRefusal {
	return new LogRefusal('sheet-too-large', `${file} is too large for a spreadsheet; export it as CSV.`, file);
}

/** A date cell is a wall clock without a zone, which the reader hands over as if it were UTC. */
function cellText(cell: Cell): string {
	if (cell === null) return '';
	if (cell instanceof Date) {
		// Serials hold a day's fractions to about a microsecond; half a second of rounding would move rows.
		const ms = Math.round(cell.getTime() / 10) * 10;
		if (Number.isNaN(ms)) return '';
		const text = new Date(ms)
			.toISOString()
			.replace('T', ' ')
			.replace('Z', '')
			.replace(/\.000$/, '');
		// Midnight is printed as a date alone, so that a column of days beside one of clocks is seen as such.
		if (text.endsWith(' 00:00:00')) return text.slice(0, 10);
		// A clock alone is a serial below one: the day is the format's zero, not the log's.
		return ms < Date.UTC(1901, 0, 1) ? text.slice(11) : text;
	}
	if (typeof cell === 'string') return cell.replace(/[\t\r\n]+/g, ' ');
	return String(cell);
}

function sheetText(rows: readonly (readonly Cell[])[]): Uint8Array {
	const lines: string[] = [];
	// Cells never hold a tab by now; a quote at a cell's start would read as a quoted cell.
	for (const row of rows) lines.push(row.map((cell) => cellText(cell).replace(/^"/, '\u201d')).join('\t'));
	return Buffer.from(lines.join('\n') + '\n', 'utf8');
}

/**
 * The sheets of a workbook as tab-separated text, dates as wall clocks. A formula counts by the value it last had;
 * one without a value is a blank.
 * @throws LogRefusal when the workbook is too large or cannot be read
 */
export async function sheetRows(
	store: ByteStore,
	entries: readonly ZipEntry[],
	file: string
): Promise<{ name: string; text: Uint8Array }[]> {
	await refuseBombs(store, entries, file);
	const bytes = Buffer.from(await store.read(0, store.size));
	try {
		const sheets = await readWorkbook(bytes);
		return sheets
			.map((sheet) => ({ name: sheet.sheet, text: sheetText(sheet.data as Cell[][]) }))
			.filter((sheet) => sheet.text.length > 4);
	} catch (error) {
		if (error instanceof LogRefusal) throw error;
		throw new LogRefusal('sheet-damaged', `${file} is a spreadsheet that cannot be read: ${reason(error)}.`, file);
	}
}

function reason(error: unknown): string {
	return error instanceof Error ? error.message.replace(/\.$/, '').slice(0, 120) : 'damaged';
}
