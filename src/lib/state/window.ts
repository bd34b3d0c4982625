import { dayBegins, dayEnds } from '$lib/utils/clock';
import type { Window } from './queries';

/** The period and circuit of an address: `from` and `to` as dates of the site, `circuit`. */
export function windowOf(url: URL): Window {
	return {
		from: url.searchParams.get('from'),
		to: url.searchParams.get('to'),
		circuit: url.searchParams.get('circuit')
	};
}

/** The same with the dates as instants of the site, for calls that want those; a bad date is left out. */
export function instantsOf(url: URL, timeZone: string): Window {
	const { from, to, circuit } = windowOf(url);
	const valid = (date: string | null): date is string =>
		date !== null && Number.isFinite(Date.parse(`${date}T00:00:00Z`));
	return {
		from: valid(from) ? dayBegins(from, timeZone) : null,
		to: valid(to) ? dayEnds(to, timeZone) : null,
		circuit
	};
}
