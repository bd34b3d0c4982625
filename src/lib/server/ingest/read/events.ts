import { readClock, StampReader } from '../time/stamp';
import type { FilePlan, ReadContext, ReadEvent } from '../types';
import { Dictionary, type RowPlan, type RowView } from '../text/row-plan';
import { OwnerFinder } from '../columns/owner';
import { wordsOf } from '../columns/tokens';
import type { RowTime } from './row-time';

const CLEARING =
	/clear|return|normal|reset|inactive|\boff\b|rtn|gone|closed|removed|resolved|\bend(ed)?\b|ausgang|gehend/i;
const ACKNOWLEDGED = /\back/i;
const TRIP =
	/trip|shut-?down|lock-?out|critical|urgent|emergency|severe|major|immediate|\bstop\b|fault|alarm|\bhigh\b|^1$/i;
const WARNING = /warn|alert|caution|minor|pre-?alarm|maintenance|medium|limit/i;
const NOTE = /info|event|note|notice|message|status|log|operator|\blow\b|debug|diag/i;

/** What a severity cell says; `unknown` for what it does not say plainly (numbers mean something else everywhere). */
export function severityOf(cell: string): ReadEvent['severity'] {
	if (cell.trim() === '' || /^\d+$/.test(cell.trim())) return 'unknown';
	if (WARNING.test(cell)) return 'warning';
	if (TRIP.test(cell)) return 'trip';
	return NOTE.test(cell) ? 'note' : 'unknown';
}

/** Whether a line tells of an alarm's coming, its going or its acknowledgement. */
export function whatOf(state: string, text: string): ReadEvent['what'] {
	if (ACKNOWLEDGED.test(state)) return 'acknowledgement';
	if (state !== '' && CLEARING.test(state) && !/not (clear|normal)|to alarm/i.test(state)) return 'clearing';
	if (/\b(cleared|returned to normal|back to normal|reset by|alarm reset|acknowledged)\b/i.test(text)) {
		return /acknowledged/i.test(text) ? 'acknowledgement' : 'clearing';
	}
	return 'activation';
}

/** Turns the rows of an alarm or event history into events. */
export class EventRows {
	readonly plan: RowPlan;
	readonly dictionaries: Dictionary[];
	events = 0;
	first = Infinity;
	last = -Infinity;
	readonly #file: FilePlan;
	readonly #ctx: ReadContext;
	readonly #time: RowTime;
	readonly #owners: OwnerFinder;
	readonly #slots: Map<number, number>;
	readonly #clears: StampReader;
	#ready: ReadEvent[] = [];

	constructor(file: FilePlan, ctx: ReadContext, time: RowTime) {
		this.#file = file;
		this.#ctx = ctx;
		this.#time = time;
		const { roles } = file;
		const columns = [
			...new Set(
				[roles.text, roles.code, roles.severity, roles.state, roles.clearedAt, ...roles.names].filter((c) => c >= 0)
			)
		];
		this.#slots = new Map(columns.map((column, slot) => [column, slot]));
		this.dictionaries = columns.map(() => new Dictionary());
		const { column, clockColumn, order, year } = file.time;
		this.#clears = new StampReader(order, year);
		this.plan = {
			delimiter: file.delimiter,
			decimal: file.decimal,
			width: file.width,
			time: { column, clockColumn, order, year },
			numbers: [],
			words: columns
		};
		this.#owners = new OwnerFinder(ctx.unit, ctx.siblings, []);
	}

	#cell(view: RowView, column: number): string {
		const slot = this.#slots.get(column);
		return slot === undefined ? '' : (this.dictionaries[slot]?.list[view.words[slot] ?? -1] ?? '');
	}

	/** Takes a row. */
	take(view: RowView): void {
		const { roles } = this.#file;
		const at = this.#time.at(view.wall, view.offset, view.line);
		if (Number.isNaN(at)) return;
		const code = this.#cell(view, roles.code);
		const text = this.#cell(view, roles.text) || (code === '' ? '' : `code ${code}`);
		if (text === '') return;
		const state = this.#cell(view, roles.state);
		const place = roles.names.map((c) => this.#cell(view, c)).join(' ');
		const owner = this.#owners.owner(wordsOf(`${place} ${text}`));
		const event: ReadEvent = {
			at,
			text,
			...(code && code !== text ? { code } : {}),
			severity: severityOf(this.#cell(view, roles.severity)),
			what: whatOf(state, text),
			source: 'history',
			unitId: owner.unitId,
			circuit: owner.circuit
		};
		this.#push(event);
		const cleared = this.#clearing(this.#cell(view, roles.clearedAt), view);
		if (!Number.isNaN(cleared) && cleared >= at) this.#push({ ...event, at: cleared, what: 'clearing' });
	}

	#clearing(cell: string, view: RowView): number {
		if (cell === '') return NaN;
		if (this.#clears.readText(cell))
			return this.#time.at(this.#clears.out.wall, this.#clears.out.offset, view.line, 'cleared');
		const clock = readClock(cell);
		if (Number.isNaN(clock)) return NaN;
		const day = Math.floor(view.wall / 86_400_000) * 86_400_000;
		const wall = day + clock < view.wall ? day + clock + 86_400_000 : day + clock;
		return this.#time.at(wall, view.offset, view.line, 'cleared');
	}

	#push(event: ReadEvent): void {
		this.events++;
		this.first = Math.min(this.first, event.at);
		this.last = Math.max(this.last, event.at);
		this.#ready.push(event);
	}

	/** Gives what has gathered. */
	drain(): ReadEvent[] {
		const ready = this.#ready;
		this.#ready = [];
		return ready;
	}
}
