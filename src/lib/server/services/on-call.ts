import type { MailKind } from '$lib/model/mail';
import { findOrganisation } from '$lib/server/repositories/identity';
import type { SiteRow } from '$lib/server/repositories/plant';
import { receiversOf } from './mails';

type Receiver = { personId: string; email: string; name: string };

/**
 * Who is told about a site at once: the person on call there, else the office's person on call, else its managers, else
 * its owners. Who has chosen not to be told is passed over.
 */
export async function onCallFor(organisationId: string, site: SiteRow, kind: MailKind): Promise<Receiver[]> {
	const settings = (await findOrganisation(organisationId))?.settings ?? {};
	const office = typeof settings['onCallId'] === 'string' ? settings['onCallId'] : null;
	for (const personId of [site.onCallId, office]) {
		if (!personId) continue;
		const found = await receiversOf(organisationId, kind, { roles: [], personIds: [personId], siteId: site.id });
		if (found.length > 0) return found;
	}
	for (const role of ['manager', 'owner']) {
		const found = await receiversOf(organisationId, kind, { roles: [role], siteId: site.id });
		if (found.length > 0) return found;
	}
	return [];
}
