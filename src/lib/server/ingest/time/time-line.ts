import type { ZoneClock } from './zone';

/** What a stamp became, or why it is no instant. */
export type StampFate = 'ok' | 'missing' | 'impossible';

/** Stamps before the year 2000 come from a clock that lost its battery, not from a chiller's log. */
const EARLIEST = Date.UTC(2000, 0, 1);
/** A logger's clock may be ahead; two days ahead it is wrong. */
const LEAD = 2 * 86_400_000;
const YEAR = 366 * 86_400_000;
const FARTHEST = Date.UTC(2100, 0, 1);

/**
 * Wall clocks to UTC in row order. The repeated hour is settled by order: an ambiguous clock is the first of its two
 * instants unless that lies before the row before it and the second does not. A missing clock is no instant.
 */
export class TimeLine {
	readonly clock: ZoneClock;
	latest: number;
	readonly descending: boolean;
	/** Rows in the repeated hour, and how many of them order could not settle (the log begins there). */
	repeated = 0;
	unsettled = 0;
	fate: StampFate = 'ok';
	#before = NaN;
	#begun = false;

	constructor(clock: ZoneClock, now: number, descending = false) {
		this.clock = clock;
		this.latest = now + LEAD;
		this.descending = descending;
	}

	/** ms UTC of a wall clock (`offset` in minutes when the stamp carries one, else NaN), or NaN with {@link fate} set. */
	next(wall: number, offset: number): number {
		const utc = Number.isNaN(offset) ? this.#settle(wall) : wall - offset * 60_000;
		if (Number.isNaN(utc)) {
			this.fate = 'missing';
			return NaN;
		}
		// A log that begins in the future has a clock that is ahead as a whole: its rows still tell each other's time.
		if (!this.#begun && utc > this.latest && utc < FARTHEST) this.latest = utc + YEAR;
		this.#begun = true;
		if (utc < EARLIEST || utc > this.latest) {
			this.fate = 'impossible';
			return NaN;
		}
		this.fate = 'ok';
		this.#before = utc;
		return utc;
	}

	#settle(wall: number): number {
		const r = this.clock.instants(wall);
		if (r.missing) return NaN;
		if (Number.isNaN(r.second)) return r.first;
		this.repeated++;
		const before = this.#before;
		if (Number.isNaN(before)) {
			this.unsettled++;
			return this.descending ? r.second : r.first;
		}
		if (this.descending) return r.second <= before || r.first > before ? r.second : r.first;
		return r.first >= before || r.second < before ? r.first : r.second;
	}
}
