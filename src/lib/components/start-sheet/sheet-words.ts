import type { Start } from '$lib/model/wire/start';
import type { Site } from '$lib/model/wire/site-unit';
import { TRIP_KIND_WORDS } from '$lib/model/words';
import { formatClock, formatDate, formatDuration, formatElapsed } from '$lib/utils/clock';
import { withUnit } from '$lib/utils/format';

const seconds = (from: string, to: string) => (Date.parse(to) - Date.parse(from)) / 1000;

/** What became of the start, in a few words: the heading when the server found nothing stronger. */
export function findingOf(start: Start): string {
	if (start.trip) {
		const at = formatElapsed(seconds(start.startedAt, start.trip.at));
		return `tripped ${at} in, ${TRIP_KIND_WORDS[start.trip.kind]}`;
	}
	const ran = start.endedAt ? formatDuration(seconds(start.startedAt, start.endedAt)) : null;
	switch (start.outcome) {
		case 'held':
			return ran === null ? 'held, and still runs at the log’s end' : `held, ran ${ran}`;
		case 'called-off':
			return `called off after ${ran ?? 'a short run'}`;
		case 'lost':
			return 'lost: the log ends or has a gap before it can be told';
		case 'tripped':
		case 'unclear':
			return `stopped after ${ran ?? 'a run'}, and the log cannot say why`;
	}
}

/** The sheet's heading: the server's, which says when too, or when and what became of it. */
export function headingOf(start: Start, site: Site, title?: string): string {
	if (title) return title;
	const zone = site.timeZone;
	const when = `${formatDate(start.startedAt, zone, { year: true })} ${formatClock(start.startedAt, zone, { seconds: true })}`;
	return `${when}: ${findingOf(start)}`;
}

/** The trip line, when the server gave none: "Tripped 06:14:09, 124 s in: …, recorded, sampled every 5 s." */
export function tripLineOf(start: Start, site: Site): { lead: string; rest: string } {
	const sampled = `sampled every ${withUnit(String(Math.round(start.spacingSeconds)), 's')}`;
	if (!start.trip) {
		const lead = findingOf(start);
		return { lead: lead.charAt(0).toUpperCase() + lead.slice(1), rest: `. ${start.outcomeReason} Run ${sampled}.` };
	}
	const clock = formatClock(start.trip.at, site.timeZone, { seconds: true });
	const after = withUnit(String(Math.round(seconds(start.startedAt, start.trip.at))), 's');
	const text = start.trip.text ? ` The log says “${start.trip.text}”.` : '';
	const lead = `Tripped ${clock}, ${after} in:`;
	return { lead, rest: ` ${TRIP_KIND_WORDS[start.trip.kind]}, ${start.trip.basis}, ${sampled}.${text}` };
}

/** Splits a line at its first colon or full stop, so that the finding can stand in bold. */
export function splitLead(line: string): { lead: string; rest: string } {
	const cut = /[:;.] /.exec(line);
	return cut ? { lead: line.slice(0, cut.index + 1), rest: line.slice(cut.index + 1) } : { lead: line, rest: '' };
}
