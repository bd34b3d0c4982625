/** A cell of a table that goes to a file; null is an empty cell. */
export type Cell = string | number | null;

/** Quotes where RFC 4180 wants them; text that a spreadsheet would run as a formula gets an apostrophe before it. */
function cellText(cell: Cell): string {
	if (cell === null) return '';
	if (typeof cell === 'number') return Number.isFinite(cell) ? String(cell) : '';
	const safe = /^[=+@\t\r-]/.test(cell) ? `'${cell}` : cell;
	return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** One record (RFC 4180), ended with CR LF. */
export const csvRow = (cells: readonly Cell[]): string => cells.map(cellText).join(',') + '\r\n';

/** Rows as CSV (RFC 4180): comma, CR LF, a header line. */
export function toCsv(header: readonly string[], rows: readonly (readonly Cell[])[]): string {
	return [header, ...rows].map(csvRow).join('');
}
