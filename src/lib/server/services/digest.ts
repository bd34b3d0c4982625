import { now } from '$lib/server/config';
import { listCases } from '$lib/server/repositories/circle';
import { listOrganisations } from '$lib/server/repositories/identity';
import { listSites, listUnits } from '$lib/server/repositories/plant';
import { listStarts } from '$lib/server/repositories/starts';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { repeatTripOf } from './case-suggestions';
import { caseNumber } from './case-shapes';
import { origin, queueLetter, receiversOf } from './mails';

/** Once a week, for managers and owners: new repeaters, cases that wait, proofs reached. */

const WEEK = 7 * 86_400_000;
type News = { siteId: string; text: string };
export type Digest = { repeaters: News[]; waiting: News[]; proved: News[]; reopened: News[] };

/** What happened in an office in the week before an instant. */
export async function digestOf(organisationId: string, at: Date): Promise<Digest> {
	return withOrganisation(organisationId, async (tx) => {
		const sites = new Map((await listSites(tx)).map((site) => [site.id, site.name]));
		const units = await listUnits(tx);
		const ids = units.map((unit) => unit.id);
		const starts = await listStarts(tx, ids);
		const cases = await listCases(tx, ids);
		const since = at.getTime() - WEEK;
		const digest: Digest = { repeaters: [], waiting: [], proved: [], reopened: [] };
		for (const unit of units) {
			const place = `${unit.tag}, ${sites.get(unit.siteId) ?? ''}`;
			for (let circuit = 1; circuit <= unit.circuits; circuit++) {
				const own = starts.filter((row) => row.unitId === unit.id && row.circuit === String(circuit));
				const repeat = repeatTripOf(own);
				if (repeat && repeat.latest.startedAt >= since)
					digest.repeaters.push({
						siteId: unit.siteId,
						text: `${place}${unit.circuits > 1 ? `, circuit ${circuit}` : ''}: ${repeat.count} start-up trips in 14 days`
					});
			}
			for (const row of cases.filter((entry) => entry.unitId === unit.id)) {
				const news = { siteId: unit.siteId, text: `${caseNumber(row)}, ${place}: ${row.complaint}` };
				const lately = (kind: string): boolean =>
					row.timeline.some((entry) => entry.kind === kind && Date.parse(entry.at) >= since);
				if (row.state === 'open' && row.openedAt.getTime() < since) digest.waiting.push(news);
				if (lately('proved')) digest.proved.push(news);
				if (row.state === 'reopened' && lately('reopened')) digest.reopened.push(news);
			}
		}
		return digest;
	});
}

const PARTS = [
	['repeaters', 'Trips again and again'],
	['reopened', 'Came back'],
	['waiting', 'Open for over a week, nobody planned'],
	['proved', 'Proved by the starts since the change']
] as const;

async function sendDigest(organisationId: string, office: string, at: Date): Promise<void> {
	const digest = await digestOf(organisationId, at);
	const week = at.toISOString().slice(0, 10);
	for (const { personId, email } of await receiversOf(organisationId, 'digest', { roles: ['manager', 'owner'] })) {
		const paragraphs = PARTS.flatMap(([key, title]) =>
			digest[key].length === 0 ? [] : [`${title}:`, digest[key].map((news) => `- ${news.text}`).join('\n')]
		);
		const count = PARTS.reduce((sum, [key]) => sum + digest[key].length, 0);
		await queueLetter(organisationId, {
			kind: 'digest',
			to: email,
			personId,
			subject: `${office}: the week to ${week}`,
			dedupeKey: `digest ${week} ${personId}`,
			body: {
				title: count === 0 ? 'A quiet week: nothing new to tell' : `${count} things from the week to ${week}`,
				paragraphs: count === 0 ? ['No new repeater, no case that waits, no proof reached.'] : paragraphs,
				link: { words: 'Open the units', href: `${origin()}/` },
				because: 'You get this once a week as a manager or owner of the office.'
			}
		});
	}
}

/** Sends every office its week. Run twice for the same week, it is sent once. */
export async function sendDigests(at: Date = now()): Promise<void> {
	for (const { id, name } of await listOrganisations()) await sendDigest(id, name, at);
}
