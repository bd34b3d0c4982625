import { TimeLine } from '../time/time-line';
import { ZoneClock } from '../time/zone';
import type { FilePlan } from '../types';
import type { ProblemList } from './quality';

const MOST_NAMED = 20;
const YEARISH = 250 * 86_400_000;

/** A file's rows to instants, with what could not be placed counted and named. */
export class RowTime {
	missing = 0;
	impossible = 0;
	readonly #file: FilePlan;
	readonly #problems: ProblemList;
	readonly #clock: ZoneClock;
	readonly #now: number;
	readonly #lines = new Map<string, TimeLine>();
	#years = 0;
	#wall = NaN;

	constructor(file: FilePlan, now: number, problems: ProblemList) {
		this.#file = file;
		this.#problems = problems;
		this.#now = now;
		this.#clock = new ZoneClock(file.time.zone);
	}

	/** ms UTC of a row, or NaN. Points of a long layout have their own order, so each its own `key`. */
	at(wall: number, offset: number, line: number, key = ''): number {
		let timeLine = this.#lines.get(key);
		if (!timeLine) {
			timeLine = new TimeLine(this.#clock, this.#now, this.#file.time.descending);
			this.#lines.set(key, timeLine);
		}
		const t = timeLine.next(this.#file.time.year === null ? wall : this.#yearOf(wall), offset);
		if (!Number.isNaN(t)) return t;
		if (timeLine.fate === 'missing') {
			this.missing++;
			if (this.missing <= MOST_NAMED) {
				const clock = new Date(wall).toISOString().slice(0, 16).replace('T', ' ');
				this.#say(
					line,
					'missing-local-time',
					`${clock} does not exist in ${this.#file.time.zone}: the clock was put forward. The row was left out.`
				);
			}
		} else {
			this.impossible++;
			if (this.impossible <= MOST_NAMED) {
				const day = new Date(wall).toISOString().slice(0, 10);
				this.#say(
					line,
					'impossible-time',
					`A stamp of ${day} cannot be right: the logger's clock was lost. The row was left out.`
				);
			}
		}
		return NaN;
	}

	/** Stamps without a year: December to January begins the next one. */
	#yearOf(wall: number): number {
		const shifted = new Date(wall);
		shifted.setUTCFullYear(shifted.getUTCFullYear() + this.#years);
		const at = shifted.getTime();
		const leap = this.#wall - at;
		if (leap > YEARISH && !this.#file.time.descending) this.#years++;
		else if (-leap > YEARISH && this.#file.time.descending) this.#years--;
		else {
			this.#wall = at;
			return at;
		}
		shifted.setUTCFullYear(new Date(wall).getUTCFullYear() + this.#years);
		this.#wall = shifted.getTime();
		return this.#wall;
	}

	/** Problems of the whole file, once it is read. */
	finish(): void {
		const unsettled = [...this.#lines.values()].reduce((n, l) => n + l.unsettled, 0);
		if (unsettled > 0) {
			this.#say(
				null,
				'repeated-hour',
				`The log begins inside the hour that the clocks repeat; it was taken for the first of the two.`
			);
		}
		if (this.missing > MOST_NAMED) {
			this.#say(
				null,
				'missing-local-time',
				`${this.missing} rows in all fall into the hour that does not exist: perhaps this clock is not put forward. If so, name its zone.`
			);
		}
	}

	#say(line: number | null, kind: string, message: string): void {
		this.#problems.add({ file: this.#file.file, line, column: null, kind, message });
	}
}
