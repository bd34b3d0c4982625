import { AppError } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import { passwordFits } from '$lib/server/auth/passwords';
import { countSecondStep, forgiveSecondStep } from '$lib/server/auth/rate-limits';
import { newRecoveryCodes, newTotpSecret, recoveryHash, totpAddress, totpStep } from '$lib/server/auth/two-step';
import { now } from '$lib/server/config';
import {
	findPerson,
	takeRecoveryHash,
	takeTotpStep,
	updatePerson,
	type PersonRow
} from '$lib/server/repositories/identity';
import { tellSafety } from './safety-mail';

/** Two-step sign-in of a person: set up, used at sign-in, taken off. */

const wrongCode = (message: string): AppError =>
	new AppError('unauthenticated', message, { errors: [{ field: 'code', message: 'wrong' }] });

/**
 * Checks the second step of a sign-in; does nothing where it is off. A code and a recovery code work once each, also
 * when two requests bring the same one at the same instant.
 * @throws AppError `unauthenticated` with the field `code`, `too-many`
 */
export async function takeSecondStep(person: PersonRow, code: string): Promise<void> {
	if (!person.totpConfirmed || !person.totpSecret) return;
	if (code.trim() === '') throw wrongCode('Give the code of your authenticator, or a recovery code.');
	await countSecondStep(person.id);
	const step = totpStep(person.totpSecret, code, now(), person.totpLastStep);
	const taken =
		step === null ? await takeRecoveryHash(person.id, recoveryHash(code)) : await takeTotpStep(person.id, step);
	if (!taken) throw wrongCode('This code does not fit, or was used already.');
	await forgiveSecondStep(person.id);
}

/** The signed-in person. @throws AppError `forbidden` for a key: it has no account of its own */
async function self(actor: Actor): Promise<PersonRow> {
	const person = await findPerson(actor.personId);
	if (!person || actor.via !== 'session') throw new AppError('forbidden', 'This is done signed in on a page.');
	return person;
}

/**
 * The signed-in person, who has given the password once more.
 * @throws AppError `invalid` with the field `password`, `forbidden` for a key
 */
export async function demandPassword(actor: Actor, password: string): Promise<PersonRow> {
	const person = await self(actor);
	await countSecondStep(person.id);
	// Who came through an identity provider has no password here; the session is what they have.
	if (person.passwordHash !== null && !(await passwordFits(person.passwordHash, password)))
		throw new AppError('invalid', 'This is not your password.', { errors: [{ field: 'password', message: 'wrong' }] });
	await forgiveSecondStep(person.id);
	return person;
}

/** Makes a secret that waits for its first code. @throws AppError `conflict` when two-step is on already */
export async function beginTwoStep(actor: Actor, password: string): Promise<{ secret: string; address: string }> {
	const person = await demandPassword(actor, password);
	if (person.totpConfirmed) throw new AppError('conflict', 'Two-step sign-in is on already.');
	const secret = newTotpSecret();
	await updatePerson(person.id, { totpSecret: secret, totpLastStep: null });
	return { secret, address: totpAddress(secret, person.email) };
}

/** Turns it on with a first code; gives the recovery codes, which are shown this once. */
export async function confirmTwoStep(actor: Actor, code: string): Promise<{ recoveryCodes: string[] }> {
	const person = await self(actor);
	const step = person.totpSecret ? totpStep(person.totpSecret, code, now(), person.totpLastStep) : null;
	if (step === null || person.totpConfirmed) {
		throw new AppError('invalid', 'This code does not fit. Is the clock of your device right?', {
			errors: [{ field: 'code', message: 'wrong' }]
		});
	}
	const { codes, hashes } = newRecoveryCodes();
	await updatePerson(person.id, { totpConfirmed: true, totpLastStep: step, recoveryHashes: hashes });
	await tellSafety(
		person,
		'Two-step sign-in is on',
		'From now on a code of your authenticator is asked for at sign-in.'
	);
	return { recoveryCodes: codes };
}

/** Turns it off, with the password. */
export async function endTwoStep(actor: Actor, password: string): Promise<void> {
	const person = await demandPassword(actor, password);
	await updatePerson(person.id, { totpSecret: null, totpConfirmed: false, totpLastStep: null, recoveryHashes: [] });
	await tellSafety(person, 'Two-step sign-in is off', 'From now on the password alone signs you in.');
}
