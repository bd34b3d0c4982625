import { formatNumber, MINUS } from './format';

/** What Intl splits an instant into, in a zone; formatters are kept, since making one costs far more than using it. */
type Parts = {
	year: string;
	month: string;
	day: string;
	weekday: string;
	hour: string;
	minute: string;
	second: string;
	zone: string;
};

const formatters = new Map<string, Intl.DateTimeFormat>();

function formatter(timeZone: string): Intl.DateTimeFormat {
	const known = formatters.get(timeZone);
	if (known) return known;
	const made = new Intl.DateTimeFormat('en-GB', {
		timeZone,
		year: 'numeric',
		month: 'short',
		day: 'numeric',
		weekday: 'short',
		hour: '2-digit',
		minute: '2-digit',
		second: '2-digit',
		hourCycle: 'h23',
		timeZoneName: 'short'
	});
	formatters.set(timeZone, made);
	return made;
}

/** ISO text or ms UTC as ms. @throws RangeError when the text is no instant */
function instant(at: string | number): number {
	const ms = typeof at === 'number' ? at : Date.parse(at);
	if (!Number.isFinite(ms)) throw new RangeError(`"${at}" is not an instant`);
	return ms;
}

function partsOf(at: string | number, timeZone: string): Parts {
	const parts: Record<string, string> = {};
	for (const { type, value } of formatter(timeZone).formatToParts(instant(at))) parts[type] = value;
	const get = (name: string) => parts[name] ?? '';
	return {
		year: get('year'),
		// Engines disagree on "Sept"; the sheets print three letters.
		month: get('month').slice(0, 3),
		day: get('day'),
		weekday: get('weekday'),
		hour: get('hour'),
		minute: get('minute'),
		second: get('second'),
		zone: get('timeZoneName')
	};
}

/** A zone's short name. English speakers abbreviate only their own zones, so two Englishes are asked. */
function zoneName(at: string | number, timeZone: string): string {
	const british = partsOf(at, timeZone).zone;
	if (!/^GMT[+-]/.test(british)) return british;
	const american = new Intl.DateTimeFormat('en-US', { timeZone, timeZoneName: 'short' }).formatToParts(instant(at));
	return american.find((part) => part.type === 'timeZoneName')?.value ?? british;
}

/** The site's 24-hour clock of an instant: "14:20", with seconds "14:20:37". */
export function formatClock(at: string | number, timeZone: string, options: { seconds?: boolean } = {}): string {
	const p = partsOf(at, timeZone);
	return `${p.hour}:${p.minute}${options.seconds ? `:${p.second}` : ''}`;
}

/** The site's date of an instant: "Fri 6 Mar", with the year "Fri 6 Mar 2026". */
export function formatDate(at: string | number, timeZone: string, options: { year?: boolean } = {}): string {
	const p = partsOf(at, timeZone);
	return `${p.weekday} ${p.day} ${p.month}${options.year ? ` ${p.year}` : ''}`;
}

/** The site's date and clock: "Fri 6 Mar 14:20". */
export function formatDateClock(
	at: string | number,
	timeZone: string,
	options: { seconds?: boolean; year?: boolean } = {}
): string {
	return `${formatDate(at, timeZone, options)} ${formatClock(at, timeZone, options)}`;
}

/** The site's date as YYYY-MM-DD, for title blocks and inputs. */
export function isoDate(at: string | number, timeZone: string): string {
	const p = partsOf(at, timeZone);
	const month = 1 + 'JanFebMarAprMayJunJulAugSepOctNovDec'.indexOf(p.month) / 3;
	return `${p.year}-${String(month).padStart(2, '0')}-${p.day.padStart(2, '0')}`;
}

/** The date and the minute of the day at a site, for strips that end at the present. */
export function minuteOfDay(at: string | number, timeZone: string): { date: string; minute: number } {
	const p = partsOf(at, timeZone);
	return { date: isoDate(at, timeZone), minute: Number(p.hour) * 60 + Number(p.minute) };
}

/** "2026-03-06 14:20 GMT": printed at, with its zone. */
export function formatPrintedAt(at: string | number, timeZone: string): string {
	return `${isoDate(at, timeZone)} ${formatClock(at, timeZone)} ${zoneName(at, timeZone)}`;
}

/** A site's date that is already text, YYYY-MM-DD, in its pieces; `weekend` for Saturday and Sunday. */
export function dayParts(date: string): { weekday: string; day: string; month: string; weekend: boolean } {
	const p = partsOf(`${date}T12:00:00Z`, 'UTC');
	return {
		weekday: p.weekday,
		day: p.day,
		month: p.month,
		weekend: p.weekday === 'Sat' || p.weekday === 'Sun'
	};
}

/** A period as the title block prints it: "2026-02-02 to 03-06", with both years where they differ. */
export function formatPeriod(from: string, to: string): string {
	const [a, b] = [from.slice(0, 10), to.slice(0, 10)];
	if (a === b) return a;
	return `${a} to ${a.slice(0, 4) === b.slice(0, 4) ? b.slice(5) : b}`;
}

/** Minutes of a day as a clock: 860 → "14:20"; 1440 → "24:00". */
export function formatMinutes(minutes: number): string {
	const whole = Math.round(minutes);
	return `${String(Math.floor(whole / 60)).padStart(2, '0')}:${String(whole % 60).padStart(2, '0')}`;
}

/** Seconds from a start, as minutes and seconds: 95 → "1:35", −30 → "−0:30", an hour on "1:03:20". */
export function formatElapsed(seconds: number): string {
	const whole = Math.round(Math.abs(seconds));
	const [h, m, s] = [Math.floor(whole / 3600), Math.floor(whole / 60) % 60, whole % 60];
	const two = (n: number) => String(n).padStart(2, '0');
	return (seconds < 0 && whole > 0 ? MINUS : '') + (h > 0 ? `${h}:${two(m)}:${two(s)}` : `${m}:${two(s)}`);
}

/** A length of time in its two largest units: "9 h 40 min", "3 d 5 h", "51 s", "8 min". */
export function formatDuration(seconds: number): string {
	const whole = Math.round(seconds);
	if (whole < 120) return `${whole}\u00a0s`;
	const minutes = Math.round(whole / 60);
	if (minutes < 60) return `${minutes}\u00a0min`;
	if (minutes < 48 * 60) return join(Math.floor(minutes / 60), 'h', minutes % 60, 'min');
	const hours = Math.round(whole / 3600);
	return join(Math.floor(hours / 24), 'd', hours % 24, 'h');
}

function join(large: number, largeUnit: string, small: number, smallUnit: string): string {
	const head = `${formatNumber(large)}\u00a0${largeUnit}`;
	return small === 0 ? head : `${head} ${small}\u00a0${smallUnit}`;
}

/** Whole days between two instants: "23 days", "1 day", "today". */
export function formatDaysSince(from: string | number, now: string | number): string {
	const days = Math.floor((instant(now) - instant(from)) / 86_400_000);
	if (days < 1) return 'today';
	return days === 1 ? '1 day' : `${formatNumber(days)} days`;
}

/** How far a zone's clock is ahead of UTC at an instant, ms. */
function zoneOffset(at: number, timeZone: string): number {
	const p = partsOf(at, timeZone);
	const shown = Date.parse(`${isoDate(at, timeZone)}T${p.hour}:${p.minute}:${p.second}Z`);
	return shown - Math.floor(at / 1000) * 1000;
}

/**
 * The instant a date of the site begins, ISO UTC. Where the clock leaps over midnight it is the first instant after.
 * @throws RangeError when the date is none
 */
export function dayBegins(date: string, timeZone: string): string {
	const midnight = instant(`${date}T00:00:00Z`);
	// Two rounds: the offset at the guess may be that of the other side of a change of clocks.
	const guess = midnight - zoneOffset(midnight, timeZone);
	return new Date(midnight - zoneOffset(guess, timeZone)).toISOString();
}

/**
 * The instant of a clock of the site as an input gives it (`YYYY-MM-DDTHH:mm`, seconds or not), ISO UTC; null when it is
 * none. Of a repeated hour the first is taken.
 */
export function siteInstant(local: string, timeZone: string): string | null {
	const wall = Date.parse(`${local}Z`);
	if (!/^\d{4}-\d\d-\d\dT\d\d:\d\d(:\d\d)?$/.test(local) || Number.isNaN(wall)) return null;
	// A zone changes its clock at most once in these two days, so one of both offsets holds.
	const before = wall - zoneOffset(wall - 86_400_000, timeZone);
	const after = wall - zoneOffset(wall + 86_400_000, timeZone);
	const shows = (at: number): boolean => at + zoneOffset(at, timeZone) === wall;
	const found = [before, after].filter(shows);
	return new Date(found.length > 0 ? Math.min(...found) : before).toISOString();
}

/** The instant a date of the site ends, ISO UTC: the beginning of the next. */
export function dayEnds(date: string, timeZone: string): string {
	const next = new Date(instant(`${date}T00:00:00Z`) + 86_400_000).toISOString().slice(0, 10);
	return dayBegins(next, timeZone);
}
