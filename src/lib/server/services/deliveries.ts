import { maySeeSite, type Actor } from '$lib/model/people';
import { demand } from '$lib/server/auth/guard';
import { now } from '$lib/server/config';
import { listOrganisations } from '$lib/server/repositories/identity';
import { listLastComings, listLogs } from '$lib/server/repositories/logs';
import { listSites, listUnits, markLateTold, type SiteRow, type UnitRow } from '$lib/server/repositories/plant';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { formatDuration } from '$lib/utils/clock';
import { origin, queueLetter, receiversOf } from './mails';
import { onCallFor } from './on-call';

/** Units whose logs come by themselves: a late one is seen, and told once until the next log comes. */

const HOUR = 3_600_000;
/** A delivery is late after its usual time and a quarter more: this product's own choice. */
const PATIENCE = 1.25;

export type Late = { unit: UnitRow; site: SiteRow; lastAt: Date | null; lateHours: number };

/** Is a unit's delivery late? `since` is the last log, or when the unit was set up. */
export function lateBy(deliveryHours: number | null, since: Date, at: Date): number | null {
	if (deliveryHours === null) return null;
	const hours = (at.getTime() - since.getTime()) / HOUR;
	return hours > deliveryHours * PATIENCE ? hours - deliveryHours : null;
}

/** The units a person may see, with when their newest log came and by how much the next one is late, h. */
export async function comingsOf(
	actor: Actor,
	at: Date = now()
): Promise<Map<string, { lastAt: string | null; lateHours: number | null }>> {
	demand(actor, 'readOffice');
	return withOrganisation(actor.organisationId, async (tx) => {
		const last = await listLastComings(tx);
		const units = (await listUnits(tx)).filter((unit) => maySeeSite(actor, unit.siteId));
		return new Map(
			units.map((unit) => {
				const lastAt = last.get(unit.id) ?? null;
				const lateHours = lateBy(unit.deliveryHours, lastAt ?? unit.createdAt, at);
				return [unit.id, { lastAt: lastAt?.toISOString() ?? null, lateHours }];
			})
		);
	});
}

/** The units of an office whose logs are late and were not told of yet. */
async function lateUnits(organisationId: string, at: Date): Promise<Late[]> {
	return withOrganisation(organisationId, async (tx) => {
		const sites = new Map((await listSites(tx)).map((site) => [site.id, site]));
		const late: Late[] = [];
		for (const unit of await listUnits(tx)) {
			const site = sites.get(unit.siteId);
			if (!site || unit.deliveryHours === null) continue;
			const lastAt = (await listLogs(tx, unit.id))[0]?.createdAt ?? null;
			const since = lastAt ?? unit.createdAt;
			const hours = lateBy(unit.deliveryHours, since, at);
			const told = unit.lateToldAt !== null && unit.lateToldAt > since;
			if (hours !== null && !told) late.push({ unit, site, lastAt, lateHours: hours });
		}
		return late;
	});
}

async function tellLate(organisationId: string, { unit, site, lastAt, lateHours }: Late, at: Date): Promise<void> {
	const engineers = await receiversOf(organisationId, 'late-log', { roles: ['engineer'], siteId: site.id });
	const receivers = new Map(
		[...(await onCallFor(organisationId, site, 'late-log')), ...engineers].map((entry) => [entry.personId, entry])
	);
	for (const { personId, email } of receivers.values()) {
		await queueLetter(organisationId, {
			kind: 'late-log',
			to: email,
			personId,
			subject: `${unit.tag}, ${site.name}: the log is late`,
			dedupeKey: `late-log ${unit.id} ${lastAt?.toISOString() ?? 'never'} ${personId}`,
			body: {
				title: `No log from ${unit.tag} for longer than usual`,
				paragraphs: [
					`A log is expected every ${formatDuration((unit.deliveryHours ?? 0) * 3600)}. It is late by ${formatDuration(lateHours * 3600)}.`,
					lastAt ? `The last one came ${lastAt.toISOString()}.` : 'None has come yet.',
					'Look at the sender first: its clock, its key, its connection. The unit itself may be well.'
				],
				link: { words: 'Open logs and signals', href: `${origin()}/units/${unit.id}/logs` },
				because: 'You get this because you look after this site.'
			}
		});
	}
	await withOrganisation(organisationId, (tx) => markLateTold(tx, unit.id, at));
}

/** Tells about every late delivery. */
export async function tellLateLogs(at: Date = now()): Promise<void> {
	for (const { id } of await listOrganisations())
		for (const late of await lateUnits(id, at)) await tellLate(id, late, at);
}
