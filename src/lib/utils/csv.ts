/**
 * One cell of a CSV file (RFC 4180): quoted where it must be. A text that a spreadsheet would take for a formula is
 * defused with an apostrophe (OWASP, "CSV Injection"); numbers are written as they are.
 */
export function csvCell(value: string | number | null | undefined): string {
	if (value === null || value === undefined) return '';
	if (typeof value === 'number') return Number.isFinite(value) ? String(value) : '';
	const safe = /^[=+\-@\t\r]/.test(value) ? `'${value}` : value;
	return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** One record, ended with CRLF. */
export const csvRow = (cells: readonly (string | number | null | undefined)[]): string =>
	`${cells.map(csvCell).join(',')}\r\n`;
