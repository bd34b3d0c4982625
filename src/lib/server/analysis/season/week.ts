import { siteClock } from '../wording/site-clock';

/** The Monday that an instant's week begins on, by the site's calendar: "2025-06-02". */
export function weekOf(at: number, timeZone: string): string {
	const { date, weekday } = siteClock(at, timeZone);
	const monday = Date.parse(date) - ((weekday + 6) % 7) * 86_400_000;
	return new Date(monday).toISOString().slice(0, 10);
}
