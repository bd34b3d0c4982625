import Papa from 'papaparse';

/** One record: the line it begins on, and its cells as text. */
export type TextRow = { line: number; cells: string[] };

type Chunked = { data: string[][]; meta: { cursor: number } };

/**
 * Cuts text into records with PapaParse, piece by piece. A quoted cell may hold delimiters and line ends (RFC 4180).
 * Blank lines are passed over.
 */
export class PapaRows {
	readonly delimiter: string;
	#rest = '';
	#line: number;

	/** @param line number of the first line that will come */
	constructor(delimiter: string, line = 1) {
		this.delimiter = delimiter;
		this.#line = line;
	}

	/** Characters waiting for the end of their record. */
	get waiting(): number {
		return this.#rest.length;
	}

	/** Records that are complete once `text` has come; with `last`, the rest too. */
	push(text: string, last = false): TextRow[] {
		let input = this.#rest + text;
		let held = '';
		if (!last && input.endsWith('\r')) {
			held = '\r';
			input = input.slice(0, -1);
		}
		input = input.replace(/\r\n/g, '\n');
		const parser = new Papa.Parser({ delimiter: this.delimiter, newline: '\n', quoteChar: '"', escapeChar: '"' });
		const { data, meta } = parser.parse(input, 0, !last) as Chunked;
		this.#rest = last ? '' : input.slice(meta.cursor) + held;
		const rows: TextRow[] = [];
		for (const cells of data) {
			const line = this.#line;
			this.#line += 1;
			for (const cell of cells) {
				for (let at = cell.indexOf('\n'); at >= 0; at = cell.indexOf('\n', at + 1)) this.#line++;
			}
			if (cells.length > 1 || (cells[0] ?? '') !== '') rows.push({ line, cells });
		}
		return rows;
	}
}

/** All records of a text. */
export function papaRows(text: string, delimiter: string, line = 1): TextRow[] {
	return new PapaRows(delimiter, line).push(text, true);
}
