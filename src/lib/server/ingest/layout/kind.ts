import type { RowRoles } from '../types';
import { guessByName } from '../columns/by-name';
import { nameParts } from '../columns/tokens';
import { readCell, type CellValue } from '../values/cell';
import { isUnitCell } from '../values/units';
import { isNothing, stateOf } from '../values/words';

/** What the cells of one column mostly are. */
export type ColumnKind = {
	index: number;
	name: string;
	filled: number;
	numbers: number;
	states: number;
	/** Words that are neither states nor markers of no reading. */
	words: number;
	distinct: number;
};

const NAME =
	/point|^name$|tag|sensor|object|parameter|variable|channel|signal|series|trend|description|^id$|measure(ment)?$|item|metric|attribute|equip|device|unit name|data ?point|source|quantity/i;
const VALUE = /^(present ?)?value$|^val$|reading|^data$|^result$|measured|^v\d*$|amount|^pv$|wert/i;
const STATUS = /status|quality|flag|reliab|^state$|valid|^ok$|health/i;
const UNITS = /^units?$|unit of|uom|eng.*unit|einheit/i;
const MESSAGE = /message|alarm|event|description|text|fault|diagnos|condition|detail|reason|cause|trip/i;
const SEVERITY = /sever|priority|class|level|category|^type$/i;
const STATE = /state|status|transition|action|^event$|ack|from|to/i;
const CODE = /code|number|^no\.?$|^id$/i;
const CLEARED = /clear|reset|end|return|normal|off|gone/i;
/** A cell that begins with a date: the second time column of an event list. */
const DATED = /^\s*\d{1,4}[-/.]\d{1,2}[-/.]\d{1,4}\b.*\d:\d/;
/** Words of alarm lists, of the trade: common practice, no source. */
const ALARM_TEXT =
	/alarm|trip|fault|fail|low |high |cut-?out|lock-?out|shut-?down|warning|loss of|limit|protection|error|overload|emergency|reset|clear|ackn/i;

/** Counts what the cells of each column are. */
export function columnKinds(
	names: readonly string[],
	rows: readonly (readonly string[])[],
	decimal: '.' | ','
): ColumnKind[] {
	const out: CellValue = { value: NaN, bad: null };
	return names.map((name, index) => {
		const kind: ColumnKind = { index, name, filled: 0, numbers: 0, states: 0, words: 0, distinct: 0 };
		const seen = new Set<string>();
		for (const row of rows) {
			const cell = (row[index] ?? '').trim();
			if (cell === '') continue;
			kind.filled++;
			readCell(cell, decimal, out);
			if (out.bad === null) kind.numbers++;
			else if (!Number.isNaN(stateOf(cell))) kind.states++;
			else if (!isNothing(cell) && out.bad === 'unreadable') kind.words++;
			seen.add(cell);
		}
		kind.distinct = seen.size;
		return kind;
	});
}

const NO_ROLES: RowRoles = {
	names: [],
	value: -1,
	status: -1,
	unit: -1,
	text: -1,
	code: -1,
	severity: -1,
	state: -1,
	clearedAt: -1
};

/** No roles: a wide table's columns are its signals. */
export function noRoles(): RowRoles {
	return { ...NO_ROLES, names: [] };
}

function isWordy(kind: ColumnKind): boolean {
	return kind.filled > 0 && kind.words >= 0.6 * kind.filled;
}

function knownShare(rows: readonly (readonly string[])[], index: number): number {
	const distinct = [...new Set(rows.map((row) => (row[index] ?? '').trim()))].filter((n) => n !== '').slice(0, 200);
	if (distinct.length === 0) return 0;
	return distinct.filter((n) => (guessByName(nameParts(n).words, null)[0]?.sure ?? 0) >= 0.75).length / distinct.length;
}

/** Roles of a long table (time, point, value), or null when the table is none. */
export function longRoles(
	kinds: readonly ColumnKind[],
	rows: readonly (readonly string[])[],
	skip: readonly number[]
): RowRoles | null {
	const others = kinds.filter((k) => !skip.includes(k.index) && k.filled > 0);
	if (others.length < 2 || others.length > 9) return null;
	const named = others.filter((k) => VALUE.test(k.name.trim()));
	const valued = named.length > 0 ? named : others.filter((k) => k.numbers >= 0.3 * k.filled && k.distinct > 2);
	const value = valued.length === 1 ? valued[0] : named[0];
	if (!value) return null;
	const wordy = others.filter((k) => k !== value && isWordy(k) && k.distinct >= 1);
	const unit = wordy.find(
		(k) => UNITS.test(k.name) || rows.slice(0, 60).every((row) => isUnitCell(row[k.index] ?? ''))
	);
	const status = others.find((k) => k !== value && k !== unit && STATUS.test(k.name) && k.distinct <= 15);
	const candidates = wordy.filter((k) => k !== unit && k !== status && k.filled >= 0.9 * rows.length);
	const names = candidates.filter((k) => NAME.test(k.name) || knownShare(rows, k.index) >= 0.5);
	if (names.length === 0 && candidates.length === 1 && candidates[0] && named.length > 0) names.push(candidates[0]);
	// A point's name recurs, row after row; a column of words that never recur is a comment.
	const total = new Set(rows.map((row) => names.map((k) => row[k.index]).join('|'))).size;
	if (names.length === 0 || total > 0.5 * rows.length + 1) return null;
	if (total < 2 && named.length === 0) return null;
	return {
		...noRoles(),
		names: names.map((k) => k.index),
		value: value.index,
		status: status?.index ?? -1,
		unit: unit?.index ?? -1
	};
}

/** Roles of an alarm or event history, or null when the table is none. */
export function eventRoles(
	kinds: readonly ColumnKind[],
	rows: readonly (readonly string[])[],
	skip: readonly number[]
): RowRoles | null {
	const dated = (k: ColumnKind) => rows.filter((row) => DATED.test(row[k.index] ?? '')).length >= 0.6 * k.filled;
	const all = kinds.filter((k) => !skip.includes(k.index) && k.filled > 0);
	const others = all.filter((k) => !dated(k));
	const measured = others.filter((k) => k.numbers >= 0.5 * k.filled && !CODE.test(k.name) && !SEVERITY.test(k.name));
	if (others.length === 0 || others.length > 12 || measured.length > 1) return null;
	// A class or state is told by few words that recur; the text is what varies, or what is left.
	const words = others.filter(isWordy);
	const free = words.filter((k) => !SEVERITY.test(k.name.trim()) && !(STATE.test(k.name) && !MESSAGE.test(k.name)));
	const texts = free.length > 0 ? free : words;
	const alarmShare = (k: ColumnKind) =>
		rows.filter((row) => ALARM_TEXT.test(row[k.index] ?? '')).length / Math.max(1, k.filled);
	const length = (k: ColumnKind) =>
		rows.reduce((n, row) => n + (row[k.index]?.length ?? 0), 0) / Math.max(1, rows.length);
	const scored = texts
		.map((k) => ({ k, score: alarmShare(k) + (MESSAGE.test(k.name) ? 0.5 : 0) + Math.min(0.3, length(k) / 100) }))
		.sort((a, b) => b.score - a.score);
	const text = scored[0];
	const code = others.find((k) => CODE.test(k.name) && k !== text?.k);
	if ((!text || text.score < 0.5) && !(code && /alarm|fault|event/i.test(code.name))) return null;
	const rest = others.filter((k) => k !== text?.k && k !== code);
	const severity = rest.find((k) => SEVERITY.test(k.name));
	const state = rest.find(
		(k) => k !== severity && STATE.test(k.name) && k.distinct <= 12 && k.numbers < 0.5 * k.filled
	);
	return {
		...noRoles(),
		names: rest.filter((k) => k !== severity && k !== state && NAME.test(k.name) && isWordy(k)).map((k) => k.index),
		text: text?.k.index ?? code?.index ?? -1,
		code: code?.index ?? -1,
		severity: severity?.index ?? -1,
		state: state?.index ?? -1,
		clearedAt: all.find((k) => dated(k) && CLEARED.test(k.name))?.index ?? -1
	};
}
