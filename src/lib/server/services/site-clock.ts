import { DateTime } from 'luxon';

/** Days and clocks of a site, from instants. */

/** The site's date of an instant, `YYYY-MM-DD`. */
export const siteDate = (ms: number, zone: string): string => DateTime.fromMillis(ms, { zone }).toFormat('yyyy-MM-dd');

/** The site's clock of an instant, `HH:mm`. */
export const siteClock = (ms: number, zone: string): string => DateTime.fromMillis(ms, { zone }).toFormat('HH:mm');

/** The instant a site's date begins. */
export const dayStart = (date: string, zone: string): number =>
	DateTime.fromISO(date, { zone }).startOf('day').toMillis();

/** The date some days later (or earlier). */
export const addDays = (date: string, days: number): string =>
	DateTime.fromISO(date, { zone: 'utc' }).plus({ days }).toFormat('yyyy-MM-dd');

/** Every date from one to another, both included. */
export function datesBetween(from: string, to: string): string[] {
	const dates: string[] = [];
	for (let date = from; date <= to; date = addDays(date, 1)) dates.push(date);
	return dates;
}

/** `Mon 2 Mar` */
export const shortDate = (date: string): string => DateTime.fromISO(date, { zone: 'utc' }).toFormat('ccc d LLL');
