import { unitOf } from './units';
import { isNothing } from './words';

/** Why a cell is no reading. */
export const BAD_KINDS = [
	'blank',
	'dashes',
	'word',
	'sentinel',
	'impossible',
	'unreadable',
	'formula',
	'status',
	'time'
] as const;
export type BadKind = (typeof BAD_KINDS)[number];

/** A cell as a number: `value` NaN with the reason in `bad`. Reused from call to call. */
export type CellValue = { value: number; bad: BadKind | null };

const PLAIN = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?$/i;
const GROUPED_POINT = /^[+-]?\d{1,3}(?:[,'’\u00a0\u202f ]\d{3})+(?:\.\d*)?$/;
const GROUPED_COMMA = /^[+-]?\d{1,3}(?:[.'’\u00a0\u202f ]\d{3})+(?:,\d*)?$/;
const SUFFIXED = /^([+-]?[\d.,'’\u00a0\u202f ]*\d(?:e[+-]?\d+)?)\s*([^\d\s][^\d]{0,14})$/i;
const DASHES = /^[-–—_.*?~#\s]+$/;
const BRACED = /^(.*?)\s*[{[(]\s*(ok|good|fault|down|stale|disabled|unknown|bad|alarm|null|overridden)\s*[})\]]$/i;
const GOOD_STATUS = /^(ok|good|overridden|alarm)$/i;

/** A number written with the file's decimal sign, thousands marks allowed, or NaN. */
export function readNumber(text: string, decimal: '.' | ','): number {
	if (decimal === '.') {
		if (PLAIN.test(text)) return Number(text);
		return GROUPED_POINT.test(text) ? Number(text.replace(/[^\d.+-]/g, '')) : NaN;
	}
	const swapped = text.replace(',', '.');
	if (!text.includes('.') && PLAIN.test(swapped)) return Number(swapped);
	if (GROUPED_COMMA.test(text)) return Number(text.replace(/[^\d,+-]/g, '').replace(',', '.'));
	// A point where commas are the rule: one that groups no thousands is a decimal point (`0.5` among `12,3`).
	return PLAIN.test(text) && !/^[+-]?\d{1,3}\.\d{3}$/.test(text) ? Number(text) : NaN;
}

/**
 * Reads a cell as a measured number. Blanks, dashes, words of no reading, error values and formulas are NaN with their
 * kind; a unit of measure or a status in braces behind the number is passed over (a bad status makes it no reading).
 */
export function readCell(raw: string, decimal: '.' | ',', out: CellValue): CellValue {
	out.bad = null;
	let text = raw.trim();
	out.value = readNumber(text, decimal);
	if (!Number.isNaN(out.value)) return out;
	if (text === '') return fail(out, 'blank');
	if (DASHES.test(text)) return fail(out, 'dashes');
	if (text.startsWith('=')) return fail(out, 'formula');
	if (isNothing(text)) return fail(out, 'word');
	const braced = BRACED.exec(text);
	if (braced) {
		if (!GOOD_STATUS.test(braced[2] ?? '')) return fail(out, 'status');
		text = (braced[1] ?? '').trim();
		out.value = readNumber(text, decimal);
		if (!Number.isNaN(out.value)) return out;
	}
	const suffixed = SUFFIXED.exec(text);
	if (suffixed && unitOf(suffixed[2] ?? '')) out.value = readNumber((suffixed[1] ?? '').trim(), decimal);
	return Number.isNaN(out.value) ? fail(out, 'unreadable') : out;
}

function fail(out: CellValue, bad: BadKind): CellValue {
	out.value = NaN;
	out.bad = bad;
	return out;
}

/** The unit of measure written behind the number in a cell, or an empty string. */
export function cellUnit(raw: string): string {
	const text = raw.trim().replace(BRACED, '$1');
	const m = SUFFIXED.exec(text);
	return m && unitOf(m[2] ?? '') ? (m[2] ?? '').trim() : '';
}
