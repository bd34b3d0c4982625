import { findCase } from '$lib/server/repositories/circle';
import { findSite, findUnit } from '$lib/server/repositories/plant';
import { withOrganisation } from '$lib/server/repositories/transaction';
import type { CaseNews } from './case-following';
import { origin, queueLetter, receiversOf } from './mails';

/** A case that came back by itself is mailed to who has it, and to the managers. */
export async function tellReopened(organisationId: string, news: readonly CaseNews[]): Promise<void> {
	for (const { caseId, kind, text, startId } of news) {
		if (kind !== 'reopened') continue;
		const found = await withOrganisation(organisationId, async (tx) => {
			const row = await findCase(tx, caseId);
			const unit = row && (await findUnit(tx, row.unitId));
			const site = unit && (await findSite(tx, unit.siteId));
			return row && unit && site ? { row, unit, site } : null;
		});
		if (!found) continue;
		const { row, unit, site } = found;
		const wanted = { roles: ['manager'], personIds: row.assignedTo ? [row.assignedTo] : [], siteId: site.id };
		for (const { personId, email } of await receiversOf(organisationId, 'case-reopened', wanted)) {
			await queueLetter(organisationId, {
				kind: 'case-reopened',
				to: email,
				personId,
				subject: `${unit.tag}, ${site.name}: case C-${row.number} came back`,
				dedupeKey: `case-reopened ${caseId} ${startId ?? ''} ${personId}`,
				body: {
					title: `Case C-${row.number} on ${unit.tag} came back`,
					paragraphs: [text, `The complaint was: “${row.complaint}”`],
					link: { words: 'Open the case', href: `${origin()}/cases/${caseId}` },
					cautions: ['Do not keep resetting a trip. Leave every protection as it is.'],
					because: 'You get this because the case is yours, or because you manage this site.'
				}
			});
		}
	}
}
