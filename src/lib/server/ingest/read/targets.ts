import { MEASURES, type MeasureKey } from '$lib/model/quantities';
import { SIGNALS, type SeriesId, type SignalKey } from '$lib/model/signals';
import { MANY } from '../columns/guess';
import type { ColumnMapping, ColumnPlan, FilePlan, Scale } from '../types';
import { POSSIBLE } from '../values/units';

/** Where a column's readings go and how they are converted. */
export type Target = {
	mapping: ColumnMapping;
	plan: ColumnPlan;
	signal: SignalKey;
	series: SeriesId;
	form: 'number' | 'state' | 'text' | 'alarm';
	scale: Scale;
	/** Stored-unit bounds of what a working sensor reads. */
	least: number;
	most: number;
	increment: number | null;
	measure: string | null;
};

/** `stored = figure · factor + offset` for a unit of measure; gauge units add the site's air pressure (kPa). */
export function scaleOf(measure: MeasureKey, air: number): Scale {
	const m = MEASURES[measure];
	return { factor: 1 / m.factor, offset: -m.offset / m.factor + (m.gauge ? air : 0) };
}

function formOf(signal: SignalKey): Target['form'] {
	if (signal === 'alarm') return 'alarm';
	const { form } = SIGNALS[signal];
	return form === 'text' ? 'text' : form === 'binary' ? 'state' : 'number';
}

/**
 * Targets of one file's columns. Signals that several columns carry get their ordinal by position.
 * @param taken counts per unit, circuit and signal, shared by the files of a log
 */
export function targetsOf(
	file: FilePlan,
	mapping: readonly ColumnMapping[],
	air: number,
	taken: Map<string, string[]>
): Target[] {
	const targets: Target[] = [];
	for (const plan of file.columns) {
		const entry = mapping.find((m) => m.file === file.file && m.column === plan.column);
		if (!entry?.signal) continue;
		const series = seriesOf(entry, entry.signal, taken);
		if (!series) continue;
		const info = SIGNALS[entry.signal];
		const usual = POSSIBLE[info.quantity] ?? [-Infinity, Infinity];
		const rated = entry.unitOfMeasure === 'pctRated';
		const scale = entry.unitOfMeasure ? scaleOf(entry.unitOfMeasure, air) : { factor: 1, offset: 0 };
		targets.push({
			mapping: entry,
			plan,
			signal: entry.signal,
			series,
			form: formOf(entry.signal),
			scale,
			least: rated ? -20 : usual[0],
			most: rated ? 400 : usual[1],
			increment: plan.increment === null ? null : Math.abs(plan.increment * scale.factor),
			measure: rated ? 'pctRated' : null
		});
	}
	return targets;
}

/** The same column name in another file of the log continues its series; another name is a further one. */
function seriesOf(entry: ColumnMapping, signal: SignalKey, taken: Map<string, string[]>): SeriesId | null {
	const circuit = SIGNALS[signal].scope === 'unit' ? '' : entry.circuit;
	const key = `${entry.unitId}|${circuit}|${signal}`;
	const columns = taken.get(key) ?? [];
	taken.set(key, columns);
	let at = columns.indexOf(entry.column);
	if (at < 0) at = columns.push(entry.column) - 1;
	if (at === 0) return signal;
	if (!MANY.has(signal)) return signal;
	return at < 4 ? (`${signal}.${at + 1}` as SeriesId) : null;
}
