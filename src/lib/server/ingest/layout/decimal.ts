/** What the decimal sign of a text is, and whether anything settled it. */
export type DecimalGuess = { decimal: '.' | ','; sure: boolean; sample: string };

const POINT = /^[+-]?\d+\.\d+$/;
const COMMA = /^[+-]?\d+,\d+$/;

/**
 * The decimal sign from a table's cells. A comma that could also be a thousands mark in every cell (`1,234`) is the
 * one doubt, and only where no other cell settles it.
 */
export function guessDecimal(cells: Iterable<string>, delimiter: string): DecimalGuess {
	let points = 0;
	let commas = 0;
	let either = 0;
	let sample = '';
	for (const raw of cells) {
		const cell = raw.trim().replace(/[\s°%a-zA-Z/³]+$/, '');
		if (POINT.test(cell)) points++;
		else if (COMMA.test(cell)) {
			if (/^[+-]?[1-9]\d{0,2},\d{3}$/.test(cell)) {
				either++;
				sample ||= cell;
			} else commas++;
		} else if (/^[+-]?\d{1,3}(\.\d{3})+,\d+$/.test(cell)) commas++;
		else if (/^[+-]?\d{1,3}(,\d{3})+\.\d+$/.test(cell)) points++;
	}
	if (commas > points) return { decimal: ',', sure: true, sample };
	if (points > 0 || either === 0) return { decimal: '.', sure: true, sample };
	// Only cells like `1,234`: after semicolons a decimal comma is the rule, after commas (quoted) a thousands mark.
	return { decimal: delimiter === ',' ? '.' : ',', sure: false, sample };
}
