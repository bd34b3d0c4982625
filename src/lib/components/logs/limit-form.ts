import { LIMIT_QUANTITIES } from '$lib/model/limit-quantities';
import { decimalsOf, formatMeasure, formatNumber, withUnit } from '$lib/utils/format';
import { fromStored, MEASURES, pageMeasure, toStored, type UnitSystem } from '$lib/model/quantities';
import type { LimitKey, Provenance } from '$lib/model/unit';
import { formatDuration } from '$lib/utils/clock';

const MM_PER_INCH = 25.4;

/** The unit of measure a limit is shown and typed in. */
export function limitUnit(key: LimitKey, system: UnitSystem): string {
	const quantity = LIMIT_QUANTITIES[key];
	if (quantity === 'length') return system === 'ip' ? 'in' : 'mm';
	if (quantity === 'degreeSeconds') return system === 'ip' ? '°F·s' : 'K·s';
	return MEASURES[pageMeasure(quantity, system)].symbol;
}

/** A stored limit in the person's units of measure; `air` is the site's air pressure, kPa absolute. */
export function limitShown(key: LimitKey, stored: number, system: UnitSystem, air: number): number {
	const quantity = LIMIT_QUANTITIES[key];
	if (quantity === 'length') return system === 'ip' ? stored / MM_PER_INCH : stored;
	if (quantity === 'degreeSeconds') return system === 'ip' ? stored * 1.8 : stored;
	return fromStored(stored, pageMeasure(quantity, system), air);
}

/** The reverse of {@link limitShown}. */
export function limitStored(key: LimitKey, shown: number, system: UnitSystem, air: number): number {
	const quantity = LIMIT_QUANTITIES[key];
	if (quantity === 'length') return system === 'ip' ? shown * MM_PER_INCH : shown;
	if (quantity === 'degreeSeconds') return system === 'ip' ? shown / 1.8 : shown;
	return toStored(shown, pageMeasure(quantity, system), air);
}

/** A limit as the table prints it, with its unit of measure. */
export function limitText(key: LimitKey, stored: number, system: UnitSystem, air: number): string {
	const quantity = LIMIT_QUANTITIES[key];
	const shown = limitShown(key, stored, system, air);
	if (quantity === 'duration') return formatDuration(stored);
	if (quantity === 'length') return withUnit(formatNumber(shown, system === 'ip' ? 1 : 0), limitUnit(key, system));
	if (quantity === 'degreeSeconds') return withUnit(formatNumber(shown), limitUnit(key, system));
	return formatMeasure(shown, pageMeasure(quantity, system), { sign: quantity === 'temperatureDifference' });
}

/** The number a form begins with, in the person's units and without trailing zeros. */
export function limitInput(key: LimitKey, stored: number, system: UnitSystem, air: number): string {
	const quantity = LIMIT_QUANTITIES[key];
	const decimals =
		quantity === 'length' || quantity === 'degreeSeconds' ? 1 : decimalsOf(pageMeasure(quantity, system)) + 1;
	return String(Number(limitShown(key, stored, system, air).toFixed(decimals)));
}

/** A number as people type it: a comma or a point, a true minus or a hyphen; null for anything else. */
export function readNumber(text: string): number | null {
	const plain = text.trim().replace('−', '-').replace(',', '.');
	if (!/^[-+]?\d+(\.\d+)?$/.test(plain)) return null;
	return Number(plain);
}

/** Provenances a person may claim; `learned` is the analysis' own. */
export const CLAIMABLE: readonly Provenance[] = ['maker', 'practice', 'given', 'source'];
