import { maySeeSite, type Actor } from '$lib/model/people';
import type { CaseSuggestion } from '$lib/model/wire/case';
import { TRIP_KIND_WORDS } from '$lib/model/words';
import { demand } from '$lib/server/auth/guard';
import { listCases } from '$lib/server/repositories/circle';
import { listSites, listUnits } from '$lib/server/repositories/plant';
import { listStarts, type StartRow } from '$lib/server/repositories/starts';
import { withOrganisation } from '$lib/server/repositories/transaction';

/** Units that trip again and again and have no open case. */

const DAY = 86_400_000;
/** A start-up trip repeats when another of its kind was within this time before it: this product's own choice. */
const REPEAT_WITHIN = 14 * DAY;
/** It is fresh while the unit's logs do not go on longer than this after it: this product's own choice. */
const FRESH_FOR = 3 * DAY;

export type RepeatTrip = { latest: StartRow; count: number };

/**
 * The latest start-up trip of one circuit when it repeats: another of the same kind, in another episode, within 14 days
 * before it. Null otherwise, or when the starts went on for more than three days after it. Attended starts do not count.
 */
export function repeatTripOf(rows: readonly StartRow[]): RepeatTrip | null {
	const trips = rows.filter(({ record }) => record.startupTrip && !record.attended && record.trip !== null);
	const latest = trips.at(-1);
	const last = rows.at(-1);
	if (!latest || !last || last.startedAt - latest.startedAt > FRESH_FOR) return null;
	const alike = trips.filter(
		({ startedAt, record }) =>
			startedAt > latest.startedAt - REPEAT_WITHIN && record.trip?.kind === latest.record.trip?.kind
	);
	const episodes = new Set(alike.map(({ record }) => record.episode ?? record.startedAt));
	return episodes.size >= 2 ? { latest, count: episodes.size } : null;
}

/** What an open case could be made from. */
export async function caseSuggestions(actor: Actor): Promise<CaseSuggestion[]> {
	demand(actor, 'readSuspects');
	return withOrganisation(actor.organisationId, async (tx) => {
		const sites = new Map((await listSites(tx)).map((site) => [site.id, site]));
		const units = (await listUnits(tx)).filter((unit) => maySeeSite(actor, unit.siteId));
		const ids = units.map((unit) => unit.id);
		const starts = await listStarts(tx, ids);
		const cases = (await listCases(tx, ids)).filter((row) => row.state !== 'closed');
		return units.flatMap((unit) => {
			const circuits = Array.from({ length: unit.circuits }, (_, i) => String(i + 1));
			return circuits.flatMap((circuit) => {
				const has = cases.some((row) => row.unitId === unit.id && (row.circuit === null || row.circuit === circuit));
				const repeat = repeatTripOf(starts.filter((row) => row.unitId === unit.id && row.circuit === circuit));
				if (has || !repeat?.latest.record.trip) return [];
				const { latest, count } = repeat;
				const kind = TRIP_KIND_WORDS[latest.record.trip?.kind ?? 'unknown'];
				return [
					{
						unitId: unit.id,
						unitTag: unit.tag,
						siteName: sites.get(unit.siteId)?.name ?? '',
						circuit,
						startId: latest.id,
						at: new Date(latest.startedAt).toISOString(),
						text: `Start-up trip on ${kind}, ${count} in 14 days`
					}
				];
			});
		});
	});
}
