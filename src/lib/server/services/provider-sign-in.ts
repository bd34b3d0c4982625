import { AppError } from '$lib/model/errors';
import { beginJourney, endJourney, hasProvider, type Identity, type Journey } from '$lib/server/auth/provider';
import { beginSession } from '$lib/server/auth/sessions';
import { now } from '$lib/server/config';
import {
	findPersonByEmail,
	findPersonBySubject,
	membershipsOf,
	updatePerson,
	type PersonRow
} from '$lib/server/repositories/identity';
import { z } from 'zod';
import type { SignedIn } from './people';

/** Sign-in through the office's identity provider. The second step is the provider's own then. */

export { beginJourney, hasProvider, type Journey };

/** The person behind an identity: known by it already, or by an address that the provider has verified. */
async function personOf(identity: Identity): Promise<PersonRow | null> {
	const known = await findPersonBySubject(identity.subject);
	if (known) return known;
	if (!identity.email || !identity.emailVerified) return null;
	const byEmail = await findPersonByEmail(identity.email);
	if (!byEmail || byEmail.oidcSubject !== null) return null;
	await updatePerson(byEmail.id, { oidcSubject: identity.subject });
	return byEmail;
}

/** Signs in who came back from the provider. @throws AppError `unauthenticated`, `forbidden` for who is no member */
export async function signInThroughProvider(
	redirect: string,
	journey: Journey,
	came: { state: string | null; code: string | null },
	userAgent: string | null
): Promise<SignedIn> {
	const identity = await endJourney(redirect, journey, came);
	const person = await personOf(identity);
	const member = person && (await membershipsOf(person.id))[0];
	if (!person || !member)
		throw new AppError(
			'forbidden',
			`${identity.email ?? 'This identity'} is no member here. Ask the office for an invitation.`
		);
	return beginSession(person.id, member.organisationId, userAgent, now());
}

const journeySchema = z.object({
	state: z.string().min(20),
	verifier: z.string().min(20),
	nonce: z.string().min(20),
	next: z.string().regex(/^\/(?![/\\])/)
});

/** What the browser kept; null when it is none of ours. */
export function readJourney(text: string | undefined): Journey | null {
	try {
		return journeySchema.parse(JSON.parse(text ?? ''));
	} catch {
		return null;
	}
}
