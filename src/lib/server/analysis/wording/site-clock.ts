export type SiteClock = {
	/** The site's date, YYYY-MM-DD. */
	date: string;
	/** Minutes after the site's midnight, with fractions. */
	minutes: number;
	/** 0 Sunday … 6 Saturday. */
	weekday: number;
};

const formatters = new Map<string, Intl.DateTimeFormat>();

function formatterOf(timeZone: string): Intl.DateTimeFormat {
	let formatter = formatters.get(timeZone);
	if (!formatter) {
		formatter = new Intl.DateTimeFormat('en-GB', {
			timeZone,
			year: 'numeric',
			month: '2-digit',
			day: '2-digit',
			hour: '2-digit',
			minute: '2-digit',
			second: '2-digit',
			hourCycle: 'h23'
		});
		formatters.set(timeZone, formatter);
	}
	return formatter;
}

/**
 * Date, clock and weekday of an instant at a site.
 * @param at ms UTC
 * @param timeZone IANA zone
 * @throws RangeError when the zone is not known or the instant is no time
 */
export function siteClock(at: number, timeZone: string): SiteClock {
	const parts = new Map(
		formatterOf(timeZone)
			.formatToParts(at)
			.map((part) => [part.type, part.value])
	);
	const number = (type: Intl.DateTimeFormatPartTypes) => Number(parts.get(type));
	const date = `${parts.get('year') ?? ''}-${parts.get('month') ?? ''}-${parts.get('day') ?? ''}`;
	return {
		date,
		minutes: number('hour') * 60 + number('minute') + number('second') / 60,
		weekday: new Date(`${date}T00:00:00Z`).getUTCDay()
	};
}

/** Minutes of the day as a clock: 347 → "05:47". */
export function clockWords(minutes: number): string {
	const whole = ((Math.round(minutes) % 1440) + 1440) % 1440;
	return `${String(Math.floor(whole / 60)).padStart(2, '0')}:${String(whole % 60).padStart(2, '0')}`;
}
