import { recordAudit } from '$lib/server/repositories/audit';
import { membershipsOf } from '$lib/server/repositories/identity';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { queueLetter } from './mails';

/**
 * Tells a person that something about their account's safety changed, at the address it had, and writes it into the
 * trail of every office they belong to.
 */
export async function tellSafety(
	person: { id: string; email: string; name: string },
	title: string,
	words: string
): Promise<void> {
	const offices = await membershipsOf(person.id);
	for (const { organisationId, role, siteIds } of offices)
		await withOrganisation(organisationId, (tx) =>
			recordAudit(
				tx,
				{ ...person, organisationId, personId: person.id, role, siteIds, via: 'session', scopes: null },
				{ action: 'changed', subject: 'their own account', subjectId: person.id, after: { what: title } }
			)
		);
	const [first] = offices;
	if (!first) return;
	await queueLetter(first.organisationId, {
		kind: 'security',
		to: person.email,
		personId: person.id,
		subject: title,
		body: {
			title,
			paragraphs: [words, 'If it was not you, ask your office’s owner at once.'],
			because: 'You get this because it is about your account.'
		}
	});
}
