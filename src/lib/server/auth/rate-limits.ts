import { AppError } from '$lib/model/errors';
import { RateLimiterMemory, RateLimiterRes } from 'rate-limiter-flexible';

// In the memory of each web process: enough against guessing, and it needs no write per request.
const signIn = new RateLimiterMemory({ points: 10, duration: 300, blockDuration: 300 });
// Six digits, three of them right at a time, ten tries in a quarter of an hour: years of guessing.
const secondStep = new RateLimiterMemory({ points: 10, duration: 900, blockDuration: 900 });
const letters = new RateLimiterMemory({ points: 5, duration: 3600 });
const letterSenders = new RateLimiterMemory({ points: 20, duration: 3600 });

async function consume(limiter: RateLimiterMemory, key: string, words: string): Promise<void> {
	try {
		await limiter.consume(key);
	} catch (error) {
		if (!(error instanceof RateLimiterRes)) throw error;
		const seconds = Math.ceil(error.msBeforeNext / 1000);
		throw new AppError('too-many', `${words} Wait ${seconds} s.`, { retryAfterSeconds: seconds });
	}
}

/**
 * Counts one try to sign in for an address and a sender.
 * @throws AppError `too-many` with the seconds to wait
 */
export const countSignIn = (email: string, sender: string): Promise<void> =>
	consume(signIn, `${email.toLowerCase()} ${sender}`, 'Too many tries.');

/** Forgets the tries of an address that got in. */
export const forgiveSignIn = (email: string, sender: string): Promise<boolean> =>
	signIn.delete(`${email.toLowerCase()} ${sender}`);

/**
 * Counts one try at a person's second step, from wherever it comes.
 * @throws AppError `too-many` with the seconds to wait
 */
export const countSecondStep = (personId: string): Promise<void> => consume(secondStep, personId, 'Too many codes.');

/** Forgets the codes of a person who gave the right one. */
export const forgiveSecondStep = (personId: string): Promise<boolean> => secondStep.delete(personId);

/**
 * Counts one message that somebody who is not signed in asks for, whether the address is known or not.
 * @throws AppError `too-many` with the seconds to wait
 */
export async function countLetter(email: string, sender: string): Promise<void> {
	await consume(letterSenders, sender, 'Too many messages asked for.');
	await consume(letters, email.trim().toLowerCase(), 'Too many messages asked for.');
}
