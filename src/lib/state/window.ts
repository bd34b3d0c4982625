import type { Window } from './queries';

/** The period and circuit of an address: `from` and `to` as dates of the site, `circuit`. */
export function windowOf(url: URL): Window {
	return {
		from: url.searchParams.get('from'),
		to: url.searchParams.get('to'),
		circuit: url.searchParams.get('circuit')
	};
}
