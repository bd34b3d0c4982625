import { may, ROLE_NAMES, type Actor } from '$lib/model/people';
import { demand } from '$lib/server/auth/guard';
import { listAudit } from '$lib/server/repositories/audit';
import { listMembers } from '$lib/server/repositories/identity';
import { listMails } from '$lib/server/repositories/mails';
import { listSites } from '$lib/server/repositories/plant';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { keysOf } from './keys';

/** What the Office sheet shows: who may do what, which keys are out, what was mailed, and who did what. */

const AUDIT_LINES = 60;
const MAIL_LINES = 40;

/** The office at one glance. Keys and the audit trail are the owner's only. @throws AppError `forbidden` */
export async function officeOf(actor: Actor) {
	demand(actor, 'readOffice');
	const owner = may(actor, 'office');
	const members = await listMembers(actor.organisationId);
	const rows = await withOrganisation(actor.organisationId, async (tx) => ({
		sites: await listSites(tx),
		audit: owner ? await listAudit(tx, AUDIT_LINES) : [],
		mails: await listMails(tx, MAIL_LINES)
	}));
	const siteNames = new Map(rows.sites.map((site) => [site.id, site.name]));
	return {
		owner,
		members: members.map((member) => ({
			id: member.personId,
			name: member.name,
			email: member.email,
			role: ROLE_NAMES[member.role],
			sites: member.siteIds?.map((id) => siteNames.get(id) ?? 'a removed site') ?? null,
			left: member.leftAt?.toISOString() ?? null
		})),
		keys: owner ? await keysOf(actor) : [],
		mails: rows.mails.map(({ id, kind, to, subject, state, tries, error, createdAt }) => ({
			id,
			kind,
			to,
			subject,
			state,
			tries,
			error,
			createdAt: createdAt.toISOString()
		})),
		audit: rows.audit.map(({ id, at, byName, action, subject, subjectId }) => ({
			id,
			at: at.toISOString(),
			by: byName ?? 'Firstpull',
			action,
			subject,
			subjectId
		}))
	};
}
