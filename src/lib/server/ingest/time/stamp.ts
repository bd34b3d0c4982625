import type { DateOrder } from '../types';
import { abbreviationOffset, isWeekday, monthOf } from './words';

/**
 * One stamp read: `wall` is ms as if the wall clock were UTC; `offset` minutes east of UTC when the stamp says so,
 * else NaN; `hasClock` is false for a date alone. Reused from call to call.
 */
export type Stamp = { wall: number; offset: number; hasClock: boolean; hasYear: boolean; twelveHour: boolean };

const ZERO = 48;
const DAY = 86_400_000;
const SERIAL_EPOCH = Date.UTC(1899, 11, 30);

/** Reads stamps of one order from bytes: the fast and the exact row reader share it, so they cannot disagree. */
export class StampReader {
	readonly order: DateOrder;
	readonly out: Stamp = { wall: NaN, offset: NaN, hasClock: false, hasYear: false, twelveHour: false };
	/** Year given to stamps that carry none. */
	year: number;
	#nums = new Float64Array(10);
	#lens = new Int32Array(10);
	#count = 0;
	#clockFrom = -1;
	#month = 0;
	#monthAt = -1;
	#half = 0;
	#fraction = 0;
	#scratch = new Uint8Array(80);
	#dayKey = -1;
	#dayMs = NaN;

	constructor(order: DateOrder, year: number | null) {
		this.order = order;
		this.year = year ?? 2000;
	}

	/** {@link read} of a string. */
	readText(text: string): boolean {
		const n = Math.min(text.length, 80);
		for (let i = 0; i < n; i++) {
			const code = text.charCodeAt(i);
			this.#scratch[i] = code < 128 ? code : 32;
		}
		return text.length <= 80 && this.read(this.#scratch, 0, n);
	}

	/** Reads bytes `from` to `to`; false when they are no stamp of this order. The stamp is then in `out`. */
	read(b: Uint8Array, from: number, to: number): boolean {
		if (this.order === 'epoch-s' || this.order === 'epoch-ms' || this.order === 'serial') {
			return this.#number(b, from, to);
		}
		this.#count = 0;
		this.#clockFrom = -1;
		this.#month = 0;
		this.#monthAt = -1;
		this.#half = 0;
		this.#fraction = 0;
		this.out.offset = NaN;
		return this.#tokens(b, from, to) && this.#assemble();
	}

	#number(b: Uint8Array, from: number, to: number): boolean {
		let text = '';
		for (let i = from; i < to; i++) text += String.fromCharCode(b[i] ?? 32);
		text = text.trim().replace(',', '.');
		if (!/^\d+(\.\d*)?$/.test(text)) return false;
		const n = Number(text);
		const out = this.out;
		out.hasClock = out.hasYear = true;
		out.twelveHour = false;
		if (this.order === 'serial') {
			if (n < 61 || n > 200_000) return false;
			// The 1900 rule: day 60 never was, so serials from 61 count from 1899-12-30. Milliseconds are what a double holds.
			out.offset = NaN;
			out.wall = SERIAL_EPOCH + Math.round(n * DAY);
			return true;
		}
		out.offset = 0;
		out.wall = this.order === 'epoch-s' ? Math.round(n * 1000) : Math.round(n);
		return out.wall < 4.2e12;
	}

	#tokens(b: Uint8Array, from: number, to: number): boolean {
		let i = from;
		while (i < to) {
			const c = b[i] ?? 0;
			if (c >= ZERO && c <= 57) {
				i = this.#digits(b, i, to);
				if (i < 0) return false;
			} else if ((c | 32) >= 97 && (c | 32) <= 122) {
				i = this.#word(b, i, to);
				if (i < 0) return false;
			} else if ((c === 43 || c === 45) && this.#clockFrom >= 0 && this.#clockClosed(b, i)) {
				return this.#offsetAt(b, i, to);
			} else i++;
		}
		return true;
	}

	/** A sign is an offset's only when the clock already has its minutes. */
	#clockClosed(b: Uint8Array, i: number): boolean {
		return this.#count >= this.#clockFrom + 2 && (b[i - 1] ?? 0) !== 58;
	}

	#digits(b: Uint8Array, i: number, to: number): number {
		let n = 0;
		const start = i;
		while (i < to) {
			const d = (b[i] ?? 0) - ZERO;
			if (d < 0 || d > 9) break;
			n = n * 10 + d;
			i++;
		}
		const before = b[start - 1] ?? 0;
		const inClock = this.#clockFrom >= 0 && this.#count > this.#clockFrom;
		if (inClock && (before === 46 || before === 44) && this.#count === this.#clockFrom + 3) {
			this.#fraction = n / 10 ** (i - start);
			return i;
		}
		if (this.#count >= 9 || i - start > 14) return -1;
		if (this.#clockFrom < 0 && b[i] === 58) this.#clockFrom = this.#count;
		this.#nums[this.#count] = n;
		this.#lens[this.#count] = i - start;
		this.#count++;
		return i;
	}

	#word(b: Uint8Array, i: number, to: number): number {
		let word = '';
		while (i < to && word.length < 12) {
			const c = (b[i] ?? 0) | 32;
			if (c === 46 && word.length === 1) {
				// a.m. and p.m.: the point between does not end the word
				i++;
				continue;
			}
			if (c < 97 || c > 122) break;
			word += String.fromCharCode(c);
			i++;
		}
		if (word === 't' && this.#count > 0) return i;
		if (word === 'am' || word === 'pm' || ((word === 'a' || word === 'p') && this.#clockFrom >= 0)) {
			this.#half = word.startsWith('p') ? 2 : 1;
			return i;
		}
		const month = monthOf(word);
		if (month > 0 && this.#month === 0) {
			this.#month = month;
			this.#monthAt = this.#count;
			return i;
		}
		if (isWeekday(word)) return i;
		const offset = abbreviationOffset(word);
		if (!Number.isNaN(offset)) {
			this.out.offset = offset;
			return i;
		}
		// A zone's name after an offset (`Z London`) adds nothing to it; any other word means this is no stamp.
		return Number.isNaN(this.out.offset) ? -1 : i;
	}

	#offsetAt(b: Uint8Array, at: number, to: number): boolean {
		let digits = '';
		let i = at + 1;
		for (; i < to; i++) {
			const c = b[i] ?? 0;
			if (c >= ZERO && c <= 57) digits += String.fromCharCode(c);
			else if (c !== 58) break;
		}
		if (digits.length !== 2 && digits.length !== 4) return false;
		const minutes = Number(digits.slice(0, 2)) * 60 + Number(digits.slice(2) || 0);
		if (minutes > 14 * 60) return false;
		this.out.offset = b[at] === 45 ? -minutes : minutes;
		return true;
	}

	#assemble(): boolean {
		if (this.#clockFrom < 0) this.#splitCompact();
		const dateCount = this.#clockFrom < 0 ? this.#count : this.#clockFrom;
		const day = this.#day(dateCount);
		if (Number.isNaN(day)) return false;
		const clock = this.#clock(this.#clockFrom < 0 ? this.#count : this.#clockFrom);
		if (Number.isNaN(clock)) return false;
		this.out.wall = day + clock;
		this.out.hasClock = this.#clockFrom >= 0;
		this.out.twelveHour = this.#half > 0;
		return true;
	}

	/** `20250305`, `20250305 1300`, `202503051300`, and a clock written with points: find where the clock begins. */
	#splitCompact(): void {
		const [n0, l0] = [this.#nums[0] ?? 0, this.#lens[0] ?? 0];
		if (this.order === 'ymd' && (l0 === 14 || l0 === 12) && this.#count === 1) {
			const clock = l0 === 14 ? n0 % 1e6 : (n0 % 1e4) * 100;
			this.#nums[0] = Math.floor(n0 / (l0 === 14 ? 1e6 : 1e4));
			this.#lens[0] = 8;
			this.#pushClock(1, clock);
		} else if (l0 === 8 && this.#count === 2 && (this.#lens[1] === 6 || this.#lens[1] === 4)) {
			const n1 = this.#nums[1] ?? 0;
			this.#pushClock(1, this.#lens[1] === 6 ? n1 : n1 * 100);
		} else {
			const dateParts = this.order === 'md' || this.order === 'dm' ? 2 : 3;
			const need = l0 === 8 ? 1 : dateParts - (this.#month > 0 ? 1 : 0);
			if (this.#count >= need + 2 || (this.#half > 0 && this.#count === need + 1)) this.#clockFrom = need;
		}
	}

	#pushClock(at: number, hhmmss: number): void {
		this.#nums[at] = Math.floor(hhmmss / 1e4);
		this.#nums[at + 1] = Math.floor(hhmmss / 100) % 100;
		this.#nums[at + 2] = hhmmss % 100;
		this.#count = at + 3;
		this.#clockFrom = at;
	}

	#day(count: number): number {
		const nums = this.#nums;
		const [a, b, c] = [nums[0] ?? 0, nums[1] ?? 0, nums[2] ?? 0];
		let y = 0;
		let m = 0;
		let d = 0;
		this.out.hasYear = true;
		if (this.#clockFrom === 0 && this.#monthAt < 0) return NaN;
		if (this.#month > 0) {
			m = this.#month;
			// The year may stand after the clock: `Wed Mar 05 13:00:00 2025`.
			const last = this.#count - 1;
			const tail =
				this.#clockFrom >= 0 && last >= this.#clockFrom + 2 && this.#lens[last] === 4 ? (nums[last] ?? 0) : -1;
			if (count === 2) [d, y] = (this.#lens[0] ?? 0) === 4 ? [b, a] : [a, b];
			else if (count === 1 && tail > 1900) [d, y] = [a, tail];
			else if (count === 1) {
				[d, y] = [a, this.year];
				this.out.hasYear = false;
			} else return NaN;
		} else if (count === 1 && this.#lens[0] === 8) {
			if (this.order === 'ymd') [y, m, d] = [Math.floor(a / 1e4), Math.floor(a / 100) % 100, a % 100];
			else return NaN;
		} else if (this.order === 'ymd' && count === 3) [y, m, d] = [a, b, c];
		else if (this.order === 'dmy' && count === 3) [d, m, y] = [a, b, c];
		else if (this.order === 'mdy' && count === 3) [m, d, y] = [a, b, c];
		else if (count === 2 && (this.order === 'md' || this.order === 'dm')) {
			[m, d] = this.order === 'md' ? [a, b] : [b, a];
			y = this.year;
			this.out.hasYear = false;
		} else return NaN;
		return this.#dayStart(y, m, d);
	}

	#dayStart(y: number, m: number, d: number): number {
		// A year of two digits in front cannot be told from a day or a month.
		if (this.order === 'ymd' && this.#month === 0 && y < 100) return NaN;
		if (y < 100) y += 2000;
		if (y < 1900 || y > 2200 || m < 1 || m > 12 || d < 1 || d > 31) return NaN;
		const key = y * 372 + m * 31 + d;
		if (key === this.#dayKey) return this.#dayMs;
		const ms = Date.UTC(y, m - 1, d);
		if (new Date(ms).getUTCDate() !== d) return NaN;
		this.#dayKey = key;
		this.#dayMs = ms;
		return ms;
	}

	#clock(from: number): number {
		const nums = this.#nums;
		if (from >= this.#count) return this.#half > 0 ? NaN : 0;
		let h = nums[from] ?? 0;
		const minute = from + 1 < this.#count ? (nums[from + 1] ?? 0) : 0;
		const yearTail = this.#count === from + 3 && (this.#lens[from + 2] ?? 0) === 4;
		const s = from + 2 < this.#count && !yearTail ? (nums[from + 2] ?? 0) : 0;
		if (minute > 59 || s > 60) return NaN;
		if (this.#half > 0) {
			if (h < 1 || h > 12) return NaN;
			h = (h % 12) + (this.#half === 2 ? 12 : 0);
		}
		if (h > 24 || (h === 24 && (minute > 0 || s > 0))) return NaN;
		return ((h * 60 + minute) * 60 + s) * 1000 + Math.round(this.#fraction * 1000);
	}
}

const CLOCK = /^\s*(\d{1,2})[:.h](\d{2})(?:[:.m](\d{2})(?:[.,](\d{1,6}))?)?\s*([ap])?\.?m?\.?\s*([a-z]{1,4})?\s*$/i;

/** ms of the day of a clock alone (`13:05:00`, `1:05 PM`, `24:00`), or NaN. */
export function readClock(text: string): number {
	const m = CLOCK.exec(text);
	// `13.05` alone is a measured number more often than a clock
	if (!m || /^\s*\d+\.\d+\s*$/.test(text)) return NaN;
	let h = Number(m[1]);
	const [minute, s] = [Number(m[2]), Number(m[3] ?? 0)];
	if (m[5]) {
		if (h < 1 || h > 12) return NaN;
		h = (h % 12) + (m[5].toLowerCase() === 'p' ? 12 : 0);
	}
	if (h > 24 || minute > 59 || s > 60 || (h === 24 && minute + s > 0)) return NaN;
	return ((h * 60 + minute) * 60 + s) * 1000 + Math.round(Number(`0.${m[4] ?? 0}`) * 1000);
}
