/**
 * Tables that are aligned by spaces and have no delimiter: their cells begin at the same place of each line. A blank
 * cell is then only more spaces, so the places are found once and every line is cut there.
 */

const DELIMITERS = /[\t;|]/;
/** Columns are this many spaces apart at least: a single one stands inside stamps and names. */
const LEAST_GAP = 2;
const MOST_LINES = 400;

/** Places where cells begin, from a text's first lines; null when it is no such table. */
export function alignedCuts(text: string): number[] | null {
	const all = text.split(/\r\n|\n|\r/).filter((line) => line.trim() !== '');
	// The later lines are the table's own; titles stand at the top.
	const lines = all.slice(Math.floor(all.length / 3)).slice(0, MOST_LINES);
	if (lines.length < 5 || lines.filter((line) => DELIMITERS.test(line)).length > lines.length * 0.05) return null;
	if (lines.filter((line) => (line.match(/,/g) ?? []).length > 1).length > lines.length * 0.5) return null;
	const width = Math.max(...lines.map((line) => line.length));
	const filled = new Float64Array(width);
	for (const line of lines) for (let i = 0; i < line.length; i++) if (line[i] !== ' ') filled[i] = (filled[i] ?? 0) + 1;
	const cuts: number[] = [];
	let gap = LEAST_GAP;
	for (let i = 0; i < width; i++) {
		if ((filled[i] ?? 0) === 0) gap++;
		else {
			if (gap >= LEAST_GAP) cuts.push(i);
			gap = 0;
		}
	}
	return cuts.length >= 3 ? cuts : null;
}

/**
 * A line with tabs between its cells. A heading may reach over the place where its neighbour begins, so the cut moves
 * to the nearest gap; a line that has none there is left as it is, and then is no row of readings.
 */
export function alignLine(line: string, cuts: readonly number[]): string {
	if (line.trim() === '') return '';
	const cells: string[] = [];
	let from = 0;
	for (let k = 1; k <= cuts.length; k++) {
		let to = k < cuts.length ? (cuts[k] ?? line.length) : line.length;
		if (to < line.length && line[to - 1] !== ' ') {
			const gap = line.indexOf('  ', to);
			const next = cuts[k + 1] ?? line.length;
			if (gap < 0 || gap >= next) return line;
			to = gap;
		}
		cells.push(line.slice(from, to).trim());
		from = to;
	}
	return cells.join('\t');
}

/** Lines of a text as {@link alignLine} gives them, as bytes. */
export async function* alignText(text: AsyncIterable<Buffer>, cuts: readonly number[]): AsyncIterable<Buffer> {
	let rest: Buffer = Buffer.alloc(0);
	for await (const chunk of text) {
		const whole = rest.length > 0 ? Buffer.concat([rest, chunk]) : chunk;
		const end = whole.lastIndexOf(10) + 1;
		rest = Buffer.from(whole.subarray(end));
		// A line without an end is refused by whoever reads on: it is passed as it is.
		if (end === 0 && rest.length > 1024 * 1024) {
			yield rest;
			rest = Buffer.alloc(0);
			continue;
		}
		if (end > 0) yield aligned(whole.subarray(0, end), cuts);
	}
	if (rest.length > 0) yield aligned(rest, cuts);
}

function aligned(bytes: Buffer, cuts: readonly number[]): Buffer {
	const lines = bytes.toString('utf8').split('\n');
	return Buffer.from(lines.map((line) => alignLine(line.replace(/\r$/, ''), cuts)).join('\n'), 'utf8');
}
