/**
 * Offsets of a time zone, found once with Intl and kept: asking Intl for every stamp costs a hundred times more.
 */
const MINUTE = 60_000;
const DAY = 86_400_000;
/** Offsets are constant within a slot: no zone has changed its clock inside a quarter of an hour of UTC. */
const SLOT = 15 * MINUTE;

const FIXED = /^(?:UTC|GMT|Z|(?:UTC|GMT)?([+-])(\d{1,2})(?::?(\d{2}))?)$/i;

/** Minutes of a fixed offset written `+05:30`, `UTC-5` or `UTC`; null when `zone` is something else. */
export function fixedOffset(zone: string): number | null {
	const m = FIXED.exec(zone.trim());
	if (!m) return null;
	if (!m[1]) return 0;
	const minutes = Number(m[2]) * 60 + Number(m[3] ?? 0);
	if (minutes > 14 * 60) return null;
	return m[1] === '-' ? -minutes : minutes;
}

/** Is `zone` an IANA name this machine knows, or a fixed offset? */
export function isZone(zone: string): boolean {
	if (fixedOffset(zone) !== null) return true;
	try {
		new Intl.DateTimeFormat('en-US', { timeZone: zone });
		return true;
	} catch {
		return false;
	}
}

/** One reading of a wall clock: no instant (`missing`), one, or two (`second` is the later). */
export type WallReading = { first: number; second: number; missing: boolean };

/** Between UTC and the wall clock of one zone. */
export class ZoneClock {
	readonly zone: string;
	#fixed: number | null;
	#format: Intl.DateTimeFormat | null = null;
	#slots = new Map<number, number>();
	/** Offset of whole UTC days, NaN where the clock changes within. */
	#days = new Map<number, number>();
	#wall: WallReading = { first: NaN, second: NaN, missing: false };
	#wallSlot = NaN;
	#offsetA = 0;
	#offsetB = 0;

	/** @throws RangeError when the zone is not known */
	constructor(zone: string) {
		this.zone = zone;
		const minutes = fixedOffset(zone);
		this.#fixed = minutes === null ? null : minutes * MINUTE;
		if (this.#fixed === null) {
			this.#format = new Intl.DateTimeFormat('en-US', {
				timeZone: zone,
				hourCycle: 'h23',
				year: 'numeric',
				month: 'numeric',
				day: 'numeric',
				hour: 'numeric',
				minute: 'numeric',
				second: 'numeric'
			});
		}
	}

	/** ms to add to UTC to get the wall clock at an instant (ms UTC). */
	offsetAt(utc: number): number {
		if (this.#fixed !== null) return this.#fixed;
		const day = Math.floor(utc / DAY);
		let whole = this.#days.get(day);
		if (whole === undefined) {
			const [from, to] = [this.#ask(day * DAY), this.#ask((day + 1) * DAY)];
			whole = from === to ? from : NaN;
			this.#days.set(day, whole);
		}
		if (!Number.isNaN(whole)) return whole;
		const slot = Math.floor(utc / SLOT);
		let offset = this.#slots.get(slot);
		if (offset === undefined) {
			offset = this.#ask(slot * SLOT);
			this.#slots.set(slot, offset);
		}
		return offset;
	}

	/**
	 * The instants at which the wall clock shows `wall` (ms, as if it were UTC).
	 * Two in the repeated hour; in the missing hour none, and `first` is the instant with the offset before the change.
	 * The answer is reused by the next call.
	 */
	instants(wall: number): WallReading {
		const slot = Math.floor(wall / SLOT);
		if (slot !== this.#wallSlot) {
			this.#wallSlot = slot;
			this.#offsetA = this.offsetAt(slot * SLOT - DAY);
			this.#offsetB = this.offsetAt(slot * SLOT + DAY);
		}
		const out = this.#wall;
		const a = wall - this.#offsetA;
		out.first = a;
		out.second = NaN;
		out.missing = false;
		if (this.#offsetA === this.#offsetB) return out;
		const b = wall - this.#offsetB;
		const aHolds = this.offsetAt(a) === this.#offsetA;
		const bHolds = this.offsetAt(b) === this.#offsetB;
		if (aHolds && bHolds) {
			out.first = Math.min(a, b);
			out.second = Math.max(a, b);
		} else if (bHolds) out.first = b;
		else if (!aHolds) out.missing = true;
		return out;
	}

	#ask(utc: number): number {
		const p: Record<string, number> = {};
		for (const part of this.#format?.formatToParts(utc) ?? []) p[part.type] = Number(part.value);
		const wall = Date.UTC(p.year ?? 0, (p.month ?? 1) - 1, p.day, p.hour, p.minute, p.second);
		return wall - Math.floor(utc / 1000) * 1000;
	}
}
