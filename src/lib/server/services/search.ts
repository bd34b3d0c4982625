import { may, maySeeSite, type Actor } from '$lib/model/people';
import type { Hit } from '$lib/model/wire/office';
import {
	listCases,
	listChangesOfUnits,
	listChecksOfUnits,
	listVisits,
	type ChangeRow,
	type CheckRow
} from '$lib/server/repositories/circle';
import { listSites, listUnits, type SiteRow, type UnitRow } from '$lib/server/repositories/plant';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { caseNumber } from './case-shapes';
import { shortDate, siteDate } from './site-clock';

/** Search over units, cases, visits, checks and changes that a person may see. */

const MOST_EACH = 8;

/** Case and accents count for nothing. */
const plain = (text: string): string => text.normalize('NFD').replaceAll(/\p{M}/gu, '').toLowerCase();

/** Every word must be somewhere in the texts, in any order. */
function fits(words: readonly string[], ...texts: (string | null | undefined)[]): boolean {
	const all = plain(texts.filter(Boolean).join(' '));
	return words.every((word) => all.includes(word));
}

type Place = { unit: UnitRow; site: SiteRow };
type Asked = { words: string[]; places: ReadonlyMap<string, Place>; ids: string[]; inside: boolean };

function unitHits({ words, places }: Asked): Hit[] {
	return [...places.values()]
		.filter(({ unit, site }) =>
			fits(words, unit.tag, site.name, unit.namePlate.serial, unit.namePlate.place, unit.refrigerant)
		)
		.map(({ unit, site }) => ({ kind: 'unit', title: unit.tag, detail: site.name, href: `/units/${unit.id}` }));
}

async function caseHits(tx: Tx, { words, places, ids }: Asked): Promise<Hit[]> {
	return (await listCases(tx, ids)).flatMap((row) => {
		const place = places.get(row.unitId);
		if (!place || !fits(words, caseNumber(row), row.complaint, row.caller, place.unit.tag, place.site.name)) return [];
		const title = `${caseNumber(row)}, ${place.unit.tag}`;
		return [{ kind: 'case' as const, title, detail: row.complaint, href: `/cases/${row.id}` }];
	});
}

async function visitHits(tx: Tx, { words, places, ids }: Asked): Promise<Hit[]> {
	return (await listVisits(tx, ids)).flatMap((row) => {
		const place = places.get(row.unitId);
		const day = shortDate(row.date);
		if (!place || !fits(words, row.purpose, row.result, row.date, day, place.unit.tag, place.site.name)) return [];
		const title = `${day}, ${place.unit.tag}`;
		return [{ kind: 'visit' as const, title, detail: row.result ?? row.purpose ?? '', href: `/visits/${row.id}` }];
	});
}

/** What was recorded at a unit; it stands on the unit's sheet of checks and changes. */
function recordHit({ unit, site }: Place, kind: 'check' | 'change', row: CheckRow | ChangeRow, detail: string): Hit {
	const day = shortDate(siteDate(row.at.getTime(), site.timeZone));
	return { kind, title: `${day}, ${unit.tag}`, detail, href: `/units/${unit.id}/checks#${row.id}` };
}

async function checkHits(tx: Tx, { words, places, ids, inside }: Asked): Promise<Hit[]> {
	return (await listChecksOfUnits(tx, ids)).flatMap((row) => {
		const place = places.get(row.unitId);
		if (!place || !(inside || row.signedAt)) return [];
		const name = row.kind.replaceAll('-', ' ');
		const said = typeof row.readings['text'] === 'string' ? row.readings['text'] : null;
		if (!fits(words, name, row.verdict, said, row.note, row.byName, place.unit.tag)) return [];
		return [recordHit(place, 'check', row, row.verdict ?? said ?? row.note ?? name)];
	});
}

async function changeHits(tx: Tx, { words, places, ids }: Asked): Promise<Hit[]> {
	return (await listChangesOfUnits(tx, ids)).flatMap((row) => {
		const place = places.get(row.unitId);
		if (!place || !fits(words, row.kind, row.text, row.byName, place.unit.tag)) return [];
		return [recordHit(place, 'change', row, row.text)];
	});
}

/**
 * What holds every word of `q`, units first, a few of each kind; a client finds their own sites' and signed checks
 * only. An empty search gives nothing.
 */
export async function search(actor: Actor, q: string): Promise<Hit[]> {
	const words = plain(q).split(/\s+/).filter(Boolean);
	if (words.length === 0) return [];
	return withOrganisation(actor.organisationId, async (tx) => {
		const sites = new Map((await listSites(tx)).map((site) => [site.id, site]));
		const places = new Map<string, Place>();
		for (const unit of await listUnits(tx)) {
			const site = sites.get(unit.siteId);
			if (site && maySeeSite(actor, site.id)) places.set(unit.id, { unit, site });
		}
		const asked: Asked = { words, places, ids: [...places.keys()], inside: may(actor, 'readSuspects') };
		const found = [
			unitHits(asked),
			await caseHits(tx, asked),
			await visitHits(tx, asked),
			await checkHits(tx, asked),
			await changeHits(tx, asked)
		];
		return found.flatMap((hits) => hits.slice(0, MOST_EACH));
	});
}
