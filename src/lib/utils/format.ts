import {
	fromStored,
	MEASURES,
	pageMeasure,
	type MeasureKey,
	type Quantity,
	type UnitSystem
} from '../model/quantities';

/** U+2212; a hyphen is not a minus. */
export const MINUS = '−';
/** A space that does not break, before every unit of measure. */
const SPACE = '\u00a0';

const DECIMALS: Readonly<Partial<Record<MeasureKey, number>>> = {
	kPa: 0,
	kPag: 0,
	kPad: 0,
	bar: 2,
	barg: 2,
	bard: 2,
	MPa: 3,
	gpm: 0,
	rpm: 0,
	kWduty: 0,
	tons: 0,
	W: 0,
	s: 0,
	V: 0,
	count: 0,
	h: 0,
	onoff: 0
};

/** How many decimals a unit of measure is printed with: 0.1 for temperatures and psi, 1 for kPa and gpm. */
export function decimalsOf(measure: MeasureKey): number {
	return DECIMALS[measure] ?? 1;
}

/**
 * A number as the sheets print it: true minus, thousands with a comma, fixed decimals.
 * `sign: true` prints + before a positive number (margins, shifts, headroom). A value that rounds to zero has no sign.
 * @throws RangeError when `value` is not finite: say why a figure is absent instead
 */
export function formatNumber(value: number, decimals = 0, options: { sign?: boolean } = {}): string {
	if (!Number.isFinite(value)) throw new RangeError('only a finite number can be printed');
	const [whole = '0', part] = Math.abs(value).toFixed(decimals).split('.');
	const digits = whole.replace(/\B(?=(\d{3})+$)/g, ',') + (part === undefined ? '' : `.${part}`);
	if (!/[1-9]/.test(digits)) return digits;
	return (value < 0 ? MINUS : options.sign ? '+' : '') + digits;
}

/** A number with its unit of measure, a space between; no unit leaves none behind. */
export function withUnit(number: string, symbol: string): string {
	return symbol === '' ? number : `${number}${SPACE}${symbol}`;
}

/** A value that already is in `measure`, printed with its symbol. */
export function formatMeasure(value: number, measure: MeasureKey, options: { sign?: boolean } = {}): string {
	return withUnit(formatNumber(value, decimalsOf(measure), options), MEASURES[measure].symbol);
}

/**
 * A stored value in the person's units of measure, printed with its symbol.
 * Pressures print as gauge against `air` (kPa absolute, the site's own).
 */
export function formatStored(
	value: number,
	quantity: Quantity,
	system: UnitSystem,
	options: { sign?: boolean; air?: number } = {}
): string {
	const measure = pageMeasure(quantity, system);
	return formatMeasure(fromStored(value, measure, options.air), measure, options);
}

/** A share 0…1 as whole per cent: "27 %". */
export function formatShare(share: number, decimals = 0): string {
	return withUnit(formatNumber(share * 100, decimals), '%');
}

/** Log coverage 0…1, rounded down to a tenth of a per cent: only a whole log prints as 100 %. */
export function formatCoverage(share: number): string {
	const tenths = Math.floor(share * 1000 + 1e-9);
	return withUnit(tenths === 1000 || tenths === 0 ? String(tenths / 10) : formatNumber(tenths / 10, 1), '%');
}

/** Two ends of a range with an en dash: "12–18". */
export function formatRange(low: string, high: string): string {
	return `${low}–${high}`;
}

/** Bytes as people read them, in thousands: "6.4 MB", "75 kB", "310 B". */
export function formatBytes(bytes: number): string {
	if (bytes < 1000) return withUnit(formatNumber(bytes), 'B');
	if (bytes < 999_500) return withUnit(formatNumber(bytes / 1000), 'kB');
	if (bytes < 999_500_000) return withUnit(formatNumber(bytes / 1e6, 1), 'MB');
	return withUnit(formatNumber(bytes / 1e9, 2), 'GB');
}

/** "1 start", "2 starts"; a plural that is not `one` + s is given. */
export function counted(count: number, one: string, many = `${one}s`): string {
	return `${formatNumber(count)} ${count === 1 ? one : many}`;
}
