import type { TitleCell } from '$lib/components/ui/title-cell';
import { METHOD_VERSION } from '$lib/model/circuit-input';
import type { UnitSystem } from '$lib/model/quantities';
import type { Site, Unit } from '$lib/model/wire/site-unit';
import { formatPeriod, formatPrintedAt } from '$lib/utils/clock';
import { formatCoverage } from '$lib/utils/format';

export const MEASURES_IN_WORDS: Readonly<Record<UnitSystem, string>> = {
	ip: '°F, psi, gpm, tons',
	si: '°C, kPa, L/s, kW'
};

/** The title block of a unit's sheet, in the order of a drawing; what a sheet has no word for is left out. */
export function titleCells(
	page: { unit: Unit; site: Site; now: string },
	sheet: {
		sheet: string;
		circuit?: string | null;
		from?: string;
		to?: string;
		coverage?: number | null;
		units: UnitSystem;
		extra?: TitleCell;
		/** Leaves out units of measure and method, where a legend needs the room. */
		brief?: boolean;
	}
): TitleCell[] {
	const circuit = sheet.circuit ?? (page.unit.circuits === 1 ? '1' : null);
	const cells: TitleCell[] = [
		{ label: 'Unit', value: circuit ? `${page.unit.tag}, circuit ${circuit}` : page.unit.tag },
		{ label: 'Site', value: page.site.name, words: true },
		{ label: 'Sheet', value: sheet.sheet, words: true }
	];
	if (sheet.from && sheet.to) cells.push({ label: 'Period', value: formatPeriod(sheet.from, sheet.to) });
	if (sheet.extra) cells.push(sheet.extra);
	if (typeof sheet.coverage === 'number') cells.push({ label: 'Log coverage', value: formatCoverage(sheet.coverage) });
	if (!sheet.brief) {
		cells.push({ label: 'Units of measure', value: MEASURES_IN_WORDS[sheet.units] });
		cells.push({ label: 'Method', value: `version ${METHOD_VERSION}` });
	}
	cells.push({ label: 'Printed', value: formatPrintedAt(page.now, page.site.timeZone) });
	return cells;
}
