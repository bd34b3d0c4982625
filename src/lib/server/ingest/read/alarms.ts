import type { ReadEvent } from '../types';

const NORMAL =
	/^(|-+|0|none|no|normal|ok|okay|off|false|clear|cleared|inactive|no (active )?(alarms?|faults?|trips?)|not active|healthy|good|good\/ok|nil|null|n\/a|na|no alarm|no fault|no message|no error|all clear|reset)$/i;
const ON = /^(1|on|true|yes|active|alarm|alarmed|fault|faulted|trip|tripped|in alarm)$/i;

/** Is the text of an alarm column that of no alarm? */
export function isNormal(text: string): boolean {
	return NORMAL.test(text.trim());
}

/** Rises and falls of an alarm column as events. A text that the log begins with is latched: it is no rise. */
export class AlarmColumn {
	readonly #unitId: string;
	readonly #circuit: string;
	readonly #column: string;
	#text: string | null = null;
	#before = -Infinity;

	constructor(unitId: string, circuit: string, column: string) {
		this.#unitId = unitId;
		this.#circuit = circuit;
		this.#column = column;
	}

	/** What the column says at an instant, and the event it makes, if any. Rows out of order make none. */
	take(at: number, raw: string): { text: string; event: ReadEvent | null } {
		const normal = isNormal(raw);
		// A bare "1" or "trip" says nothing that the column's own name does not say better.
		const bare = ON.test(raw.trim());
		const text = normal ? '' : bare ? this.#column : raw.trim();
		const before = this.#text;
		if (at < this.#before) return { text, event: null };
		this.#before = at;
		this.#text = text;
		if (before === null || before === text) return { text, event: null };
		const code = /^\d{1,6}$/.test(text) ? text : undefined;
		const event: ReadEvent = {
			at,
			text: text === '' ? before : code ? `${this.#column} ${code}` : text,
			severity: 'unknown',
			what: text === '' ? 'clearing' : 'activation',
			source: 'column',
			unitId: this.#unitId,
			circuit: this.#circuit,
			...(code ? { code } : {})
		};
		return { text, event };
	}
}
