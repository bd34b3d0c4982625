import { membershipsOf } from '$lib/server/repositories/identity';
import { queueLetter } from './mails';

/** Tells a person that something about their account's safety changed, at the address it had. */
export async function tellSafety(person: { id: string; email: string }, title: string, words: string): Promise<void> {
	const office = (await membershipsOf(person.id))[0];
	if (!office) return;
	await queueLetter(office.organisationId, {
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
