import { MEASURES, type MeasureKey, type Quantity } from '$lib/model/quantities';
import { isSignalKey, SIGNALS, SIGNAL_KEYS, type Family } from '$lib/model/signals';
import type { Log, LogPreview } from '$lib/model/wire/log';

export type Entry = Log['mapping'][number];
export type Column = LogPreview['columns'][number];

/** Below this a person is asked (method: columns). */
export const ASK_BELOW = 0.8;

/** A column as its row of the mapping: the reader's guess, and what the person has made of it. */
export type Row = { column: Column; entry: Entry; touched: boolean };

/** Rows of a preview; columns that only carry time or names of points have nothing to choose. */
export function rowsOf(preview: LogPreview): Row[] {
	return preview.columns.map((column) => ({ column, entry: { ...column.guess }, touched: false }));
}

/** Does this row wait for a person's word? A column that is taken for no signal asks nothing. */
export function asks(row: Row): boolean {
	if (row.entry.confirmed || row.touched) return false;
	if (row.column.role === 'time' || row.column.role === 'point-name') return false;
	return row.entry.signal !== null && row.entry.confidence < ASK_BELOW;
}

const GROUPS: Readonly<Record<Family, string>> = {
	load: 'Running and load',
	low: 'Low side',
	water: 'Water',
	high: 'High side',
	oil: 'Oil',
	electrical: 'Electrical'
};

/** The signals to choose from, in families; the first choice is none. */
export const SIGNAL_OPTIONS: readonly { value: string; label: string; group?: string }[] = [
	{ value: '', label: 'not a signal' },
	...SIGNAL_KEYS.map((key) => ({ value: key, label: SIGNALS[key].label, group: GROUPS[SIGNALS[key].family] }))
];

/** The quantity a signal has; null for none. */
export function quantityOf(signal: string | null): Quantity | null {
	return signal !== null && isSignalKey(signal) ? SIGNALS[signal].quantity : null;
}

/** Units of measure a signal may be written in; currents may stand as a share of the rated. */
export function measureOptions(signal: string | null): { value: string; label: string }[] {
	const quantity = quantityOf(signal);
	if (quantity === null) return [{ value: '', label: 'none' }];
	const keys = (Object.keys(MEASURES) as MeasureKey[]).filter((key) => MEASURES[key].quantity === quantity);
	return keys.map((key) => ({ value: key, label: MEASURES[key].symbol || 'none' }));
}

/** The entry after a person chose a signal: a unit of measure of another quantity goes with the old signal. */
export function withSignal(entry: Entry, signal: string): Entry {
	const next = { ...entry, signal: signal === '' ? null : (signal as Entry['signal']) };
	const allowed = measureOptions(next.signal).map((option) => option.value);
	if (next.unitOfMeasure !== null && allowed.includes(next.unitOfMeasure)) return next;
	return { ...next, unitOfMeasure: allowed[0] ? allowed[0] : null };
}

/** What stands in the way of finding starts, as sentences; empty when nothing does. */
export function hindrances(rows: readonly Row[]): string[] {
	const signals = rows.map((row) => row.entry.signal).filter((signal) => signal !== null);
	const tells: string[] = ['running', 'motorCurrent', 'power', 'speed', 'capacity', 'startCommand'];
	const found: string[] = [];
	if (!signals.some((signal) => tells.includes(signal)))
		found.push('No column says when the compressor runs: running, motor current, power, speed or capacity.');
	const seen = new Map<string, string>();
	for (const { entry } of rows) {
		if (entry.signal === null) continue;
		const place = `${entry.unitId} ${entry.circuit} ${entry.signal}`;
		const other = seen.get(place);
		const several = ['phaseCurrents', 'phaseVoltages', 'alarm'].includes(entry.signal);
		if (other !== undefined && !several) found.push(`“${other}” and “${entry.column}” are taken for the same signal.`);
		seen.set(place, entry.column);
	}
	return found;
}

/** The finding as the sheet's heading. */
export function mappingTitle(
	log: Pick<Log, 'state' | 'name'>,
	asking: number,
	starts?: { all: number; tripped: number }
): string {
	if (log.state === 'refused') return `${log.name} could not be read`;
	if (log.state === 'needs-mapping')
		return asking === 0
			? 'Every column has its word: find the starts'
			: `${asking === 1 ? 'One column waits' : `${asking} columns wait`} for your word before starts are found`;
	if (log.state === 'ready') {
		if (starts === undefined) return `${log.name} is read`;
		const found = starts.all === 0 ? 'no start in it' : starts.all === 1 ? 'one start' : `${starts.all} starts`;
		return `${log.name} is read: ${found}${starts.tripped > 0 ? `, ${starts.tripped} tripped` : ''}`;
	}
	return `${log.name} is being read`;
}

/**
 * What PUT …/mapping takes: every column with a choice, confirmed. A zone goes along only when a person named one,
 * since it overrules what the reader found in the file.
 */
export function mappingBody(rows: readonly Row[], timeZone: string | null, choices: Readonly<Record<string, string>>) {
	return {
		mapping: rows
			.filter((row) => row.column.role !== 'time')
			.map(({ entry }) => ({
				file: entry.file,
				column: entry.column,
				signal: entry.signal,
				unitId: entry.unitId,
				circuit: entry.circuit,
				unitOfMeasure: entry.unitOfMeasure,
				confirmed: true
			})),
		...(timeZone ? { timeZone } : {}),
		choices
	};
}
