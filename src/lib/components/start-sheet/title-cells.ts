import type { TitleCell } from '$lib/components/ui/TitleBlock.svelte';
import type { UnitSystem } from '$lib/model/quantities';
import type { StartSheet } from '$lib/model/wire/start-sheet';
import { formatPeriod, formatPrintedAt, isoDate } from '$lib/utils/clock';
import { formatShare } from '$lib/utils/format';

/** The title block of a start sheet, in the order of every sheet. */
export function titleCells(data: StartSheet, units: UnitSystem, now: number = Date.now()): TitleCell[] {
	const { start, unit, site, period, coverage } = data;
	const zone = site.timeZone;
	const cells: TitleCell[] = [
		{ label: 'Unit', value: `${unit.tag}, circuit ${start.circuit}` },
		{ label: 'Site', value: site.name, words: true },
		{ label: 'Sheet', value: 'Start sheet', words: true }
	];
	if (period)
		cells.push({ label: 'Period of log', value: formatPeriod(isoDate(period.from, zone), isoDate(period.to, zone)) });
	if (coverage !== null && coverage !== undefined)
		cells.push({ label: 'Log coverage', value: formatShare(coverage, 1) });
	return [
		...cells,
		{ label: 'Units of measure', value: units === 'ip' ? '°F, psi, gpm, tons' : '°C, kPa, L/s, kW' },
		{ label: 'Method', value: `version ${start.methodVersion}` },
		{ label: 'Printed', value: formatPrintedAt(now, zone) }
	];
}
