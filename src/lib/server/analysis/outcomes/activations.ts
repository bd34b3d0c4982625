import type { TripWord } from '$lib/model/circuit-input';
import type { EventRecord, Series, TextSeries } from '$lib/model/series';
import type { TripKind } from '$lib/model/start';
import { median } from '../series/numbers';
import { firstAtOrAfter } from '../series/search';
import { plainWords, readAlarm } from './words';

/** One activation of a protective alarm. */
export type Activation = {
	/** ms UTC, on the log's clock */
	at: number;
	text: string;
	kind: TripKind;
	/** The supply was gone: never a trip. */
	power: boolean;
	source: 'column' | 'history';
	/** The alarm log's period, seconds: the spacing of the column's rows, 0 for a history. */
	period: number;
};

const OF_CIRCUIT = /\b(?:circuit|circ|ckt|cct|crkt)\s*(?:no\s*)?([1-4a-d])\b/;

/**
 * Does an alarm text name another circuit than this one? A history of the whole unit comes to each of its circuits.
 * Letters count as numbers: circuit B is 2.
 */
export function namesAnother(text: string, circuit: string): boolean {
	const named = OF_CIRCUIT.exec(plainWords(text))?.[1];
	if (named === undefined || !/^[1-4]$/.test(circuit)) return false;
	const number = 'abcd'.indexOf(named) + 1;
	return (number > 0 ? String(number) : named) !== circuit;
}

/** Has the compressor started between two instants? Then a text seen at both has risen twice. */
export type StartedBetween = (from: number, to: number) => boolean;

/**
 * Activations of protective alarms from the alarm column and the histories, in time order. Clearings, acknowledgements,
 * warnings, notes and texts that mean "no alarm" are left out; a latched text counts at its rise only; the same text
 * again counts only when it was gone and the compressor had started since, so that a blank cell makes no new alarm.
 */
export function activationsOf(
	column: TextSeries | undefined,
	codes: Series | undefined,
	events: readonly EventRecord[],
	own: readonly TripWord[],
	startedBetween: StartedBetween
): Activation[] {
	const words = column ?? (codes === undefined ? undefined : codesAsText(codes));
	const rises = words === undefined ? [] : columnRises(words, own, startedBetween);
	const histories = events
		.filter((e) => e.source === 'history' || words === undefined)
		.flatMap((e) => recorded(e, own));
	return [...rises, ...histories].sort((a, b) => a.at - b.at);
}

function codesAsText(codes: Series): TextSeries {
	return { t: codes.t, text: Array.from(codes.v, (v) => (Number.isNaN(v) ? '' : String(v))) };
}

function recorded(event: EventRecord, own: readonly TripWord[]): Activation[] {
	if (event.what !== 'activation' || event.severity === 'warning' || event.severity === 'note') return [];
	const text = event.text === '' ? (event.code ?? '') : event.text;
	const meaning = readAlarm(text, own, event.code);
	if (meaning.is !== 'trip' && meaning.is !== 'power') return [];
	const kind = meaning.is === 'trip' ? meaning.kind : 'unknown';
	return [{ at: event.at, text, kind, power: meaning.is === 'power', source: event.source, period: 0 }];
}

/** A cell may hold several alarms. */
function partsOf(text: string): string[] {
	return text
		.split(/[;|\n]|,\s/)
		.map((part) => part.trim())
		.filter((part) => part !== '');
}

function columnRises(column: TextSeries, own: readonly TripWord[], startedBetween: StartedBetween): Activation[] {
	const found: Activation[] = [];
	/** When each text was last seen, ms. */
	const lastSeen = new Map<string, number>();
	let previous: string | null = null;
	let previousAt = NaN;
	for (let i = 0; i < column.t.length; i++) {
		const text = column.text[i] ?? '';
		const at = column.t[i] ?? NaN;
		if (text === previous) {
			previousAt = at;
			continue;
		}
		if (previous !== null) for (const part of partsOf(previous)) lastSeen.set(plainWords(part), previousAt);
		for (const part of partsOf(text)) {
			const key = plainWords(part);
			const seen = lastSeen.get(key);
			lastSeen.set(key, at);
			// A text that stands in the first row rose before the log began.
			if (previous === null || (seen !== undefined && !startedBetween(seen, at))) continue;
			const meaning = readAlarm(part, own);
			if (meaning.is !== 'trip' && meaning.is !== 'power') continue;
			const kind = meaning.is === 'trip' ? meaning.kind : 'unknown';
			found.push({
				at,
				text: part,
				kind,
				power: meaning.is === 'power',
				source: 'column',
				period: periodAt(column.t, i)
			});
		}
		previous = text;
		previousAt = at;
	}
	return found;
}

/** Median gap of the rows around row `i`, seconds. */
function periodAt(t: Float64Array, i: number): number {
	const gaps: number[] = [];
	for (let j = Math.max(1, i - 5); j <= Math.min(t.length - 1, i + 5); j++)
		gaps.push((t[j] ?? NaN) - (t[j - 1] ?? NaN));
	return (median(gaps) ?? 0) / 1000;
}

/** Does the alarm column read, at an instant, as standing (latched) text? null where there is no column or no row. */
export function latchedAt(column: TextSeries | undefined, at: number): boolean | null {
	if (column === undefined) return null;
	const text = column.text[firstAtOrAfter(column.t, at)];
	return text === undefined ? null : readAlarm(text).is === 'trip';
}
