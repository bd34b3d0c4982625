import { AppError } from '$lib/model/errors';
import { LEAST_PASSWORD, type Actor, type Preferences, type Role } from '$lib/model/people';
import { demand } from '$lib/server/auth/guard';
import { hashPassword, passwordFits } from '$lib/server/auth/passwords';
import { countSignIn, forgiveSignIn } from '$lib/server/auth/rate-limits';
import { beginSession } from '$lib/server/auth/sessions';
import { now } from '$lib/server/config';
import {
	findOrganisation,
	findPersonByEmail,
	insertMember,
	insertOrganisation,
	insertPerson,
	listMembers,
	membershipsOf,
	savePreferences
} from '$lib/server/repositories/identity';
import { takeSecondStep } from './two-step';

export type SignedIn = { token: string; expiresAt: Date };

/**
 * Signs a person in with address and password, and with the code of the second step where it is on.
 * @throws AppError `unauthenticated` (which of the two is wrong is not said; field `code` when only that is), `too-many`
 */
export async function signIn(
	email: string,
	password: string,
	sender: string,
	userAgent: string | null,
	code = ''
): Promise<SignedIn> {
	await countSignIn(email, sender);
	const person = await findPersonByEmail(email);
	const fits = await passwordFits(person?.passwordHash ?? null, password);
	const member = person && fits ? (await membershipsOf(person.id))[0] : undefined;
	if (!person || !member) throw new AppError('unauthenticated', 'This address and password do not go together.');
	await takeSecondStep(person, code);
	await forgiveSignIn(email, sender);
	return beginSession(person.id, member.organisationId, userAgent, now());
}

/** @throws AppError `invalid` with the field `password` when it is too short */
export function demandLength(password: string): void {
	if (password.length >= LEAST_PASSWORD) return;
	const message = `${LEAST_PASSWORD} characters at least`;
	throw new AppError('invalid', `A password has ${message}.`, { errors: [{ field: 'password', message }] });
}

/** Adds a person (or finds the one with this address) as a member. @throws AppError `invalid` for a short password */
export async function addMember(
	organisationId: string,
	member: { email: string; name: string; password: string | null; role: Role; siteIds: string[] | null }
): Promise<string> {
	if (member.password !== null) demandLength(member.password);
	const known = await findPersonByEmail(member.email);
	const person =
		known ??
		(await insertPerson({
			email: member.email,
			name: member.name,
			passwordHash: member.password === null ? null : await hashPassword(member.password)
		}));
	await insertMember({ organisationId, personId: person.id, role: member.role, siteIds: member.siteIds });
	return person.id;
}

/** Makes an organisation with its owner. */
export async function foundOrganisation(
	name: string,
	owner: { email: string; name: string; password: string }
): Promise<{ organisationId: string; ownerId: string }> {
	demandLength(owner.password);
	const organisationId = await insertOrganisation(name);
	const ownerId = await addMember(organisationId, { ...owner, role: 'owner', siteIds: null });
	return { organisationId, ownerId };
}

/** Who a person is here. */
export async function describeMe(actor: Actor, preferences: Preferences) {
	const office = await findOrganisation(actor.organisationId);
	return {
		id: actor.personId,
		name: actor.name,
		email: actor.email,
		role: actor.role,
		office: office?.name ?? '',
		preferences
	};
}

/** Keeps a person's units of measure and paper. */
export async function changePreferences(actor: Actor, preferences: Preferences): Promise<Preferences> {
	await savePreferences(actor.personId, preferences);
	return preferences;
}

/** A member as the actor of work done in their name outside a request. */
export async function actorFor(email: string): Promise<Actor> {
	const person = await findPersonByEmail(email);
	const member = person && (await membershipsOf(person.id))[0];
	if (!person || !member) throw new AppError('not-found', `There is no member ${email}.`);
	return {
		organisationId: member.organisationId,
		personId: person.id,
		name: person.name,
		email: person.email,
		role: member.role,
		siteIds: member.siteIds,
		via: 'session',
		scopes: null
	};
}

/** Present members who may be given work, by name. */
export async function colleaguesOf(actor: Actor): Promise<{ id: string; name: string; role: Role }[]> {
	demand(actor, 'readSuspects');
	return (await listMembers(actor.organisationId))
		.filter(({ leftAt, role }) => leftAt === null && role !== 'client')
		.map(({ personId, name, role }) => ({ id: personId, name, role }));
}
