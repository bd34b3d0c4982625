import type { UnitSystem } from '$lib/model/quantities';
import type { StartRecord } from '$lib/model/start';
import type { Suspects } from '$lib/model/wire/start';
import { TRIP_KIND_WORDS } from '$lib/model/words';
import { countWords } from '$lib/server/analysis/wording/quantity-words';
import type { CaseRow, ChangeRow, CheckRow, VisitRow } from '$lib/server/repositories/circle';
import { caseNumber } from './case-shapes';
import { judgementOf } from './check-shapes';
import { countFirstTries } from './first-tries';
import { shortDate, siteDate } from './site-clock';

/** A unit's story in five lines at most: the call, the log, what it points to, what was read, what was done. */

type Material = {
	owner: CaseRow | null;
	records: readonly StartRecord[];
	days: { logged: number; all: number };
	suspects: Suspects['suspects'];
	verdict: Suspects['verdict'];
	checks: readonly CheckRow[];
	changes: readonly ChangeRow[];
	visits: readonly VisitRow[];
	timeZone: string;
	air: number;
};
type Line = { label: string; text: string };

const sentence = (text: string): string => (/[.!?”]$/.test(text) ? text : `${text}.`);

function callLine({ owner, timeZone }: Material): Line[] {
	if (!owner) return [];
	const said = [owner.since, owner.howOften].filter((text) => text).join('; ');
	const resets = owner.resets ? ` Resets: ${sentence(owner.resets)}` : '';
	const day = shortDate(siteDate(owner.openedAt.getTime(), timeZone));
	return [
		{
			label: 'The call.',
			text: `“${owner.complaint}” ${said ? `${sentence(said)} ` : ''}${day}, case ${caseNumber(owner)}.${resets}`
		}
	];
}

function logLine({ records, days }: Material): Line {
	const { m, k } = countFirstTries(records);
	if (m === 0) return { label: 'What the log says.', text: 'No first try in the logs given.' };
	const trips = records.filter((record) => record.startupTrip && record.trip);
	const kinds = new Map<string, number>();
	for (const { trip } of trips)
		if (trip) kinds.set(TRIP_KIND_WORDS[trip.kind], (kinds.get(TRIP_KIND_WORDS[trip.kind]) ?? 0) + 1);
	const [kind] = [...kinds].sort((a, b) => b[1] - a[1]);
	const seconds = trips.map((record) => ((record.trip?.at ?? 0) - record.startedAt) / 1000).sort((a, b) => a - b);
	const middle = seconds[Math.floor(seconds.length / 2)];
	const when =
		middle === undefined
			? ''
			: `, half of them within ${middle < 120 ? `${Math.round(middle)} s` : `${Math.round(middle / 60)} min`}`;
	const what = kind ? ` on ${kind[0]}${when}` : '';
	return {
		label: 'What the log says.',
		text: `${k} of ${countWords(m, 'first try', 'first tries')} tripped${what}, in the logs given: ${days.logged} of ${countWords(days.all, 'day')} logged.`
	};
}

function pointsLine({ suspects, verdict }: Material): Line {
	const first = suspects[0];
	if (verdict === 'no-fault-pattern') return { label: 'It points to', text: 'no fault pattern.' };
	if (!first || verdict === 'cannot-tell') return { label: 'It points to', text: 'nothing yet: this log cannot tell.' };
	const clue = first.clues.find((entry) => entry.direction === 'for');
	return { label: 'It points to', text: `${first.name.toLowerCase()}. ${clue?.sentence ?? ''}`.trim() };
}

function readLine({ checks, air, timeZone }: Material, system: UnitSystem): Line[] {
	const told = checks.filter((row) => row.kind !== 'note').slice(-2);
	if (told.length === 0) return [];
	const words = told.map(
		(row) =>
			`${shortDate(siteDate(row.at.getTime(), timeZone))}: ${sentence(judgementOf(row, system, air).sentence)}${row.indicative ? ' Indicative.' : ''}`
	);
	return [{ label: 'Already read.', text: words.join(' ') }];
}

function doneLine({ changes, visits, timeZone }: Material): Line[] {
	const done = [
		...changes.map((row) => ({ at: row.at.getTime(), text: row.text })),
		...visits.flatMap((row) =>
			row.leftAt && row.result ? [{ at: row.leftAt.getTime(), text: `visit: ${row.result}` }] : []
		)
	].sort((a, b) => a.at - b.at);
	if (done.length === 0) return [{ label: 'Already done.', text: 'Nothing on record.' }];
	const words = done.slice(-3).map(({ at, text }) => `${shortDate(siteDate(at, timeZone))}: ${sentence(text)}`);
	return [{ label: 'Already done.', text: words.join(' ') }];
}

/** The five lines. */
export function briefStory(material: Material, system: UnitSystem): Line[] {
	return [
		...callLine(material),
		logLine(material),
		pointsLine(material),
		...readLine(material, system),
		...doneLine(material)
	].slice(0, 5);
}
