import { AppError } from '$lib/model/errors';
import { RateLimiterMemory, RateLimiterRes } from 'rate-limiter-flexible';

// In the memory of each web process: enough against guessing, and it needs no write per request.
const signIn = new RateLimiterMemory({ points: 10, duration: 300, blockDuration: 300 });

/**
 * Counts one try to sign in for an address and a sender.
 * @throws AppError `too-many` with the seconds to wait
 */
export async function countSignIn(email: string, sender: string): Promise<void> {
	try {
		await signIn.consume(`${email.toLowerCase()} ${sender}`);
	} catch (error) {
		if (!(error instanceof RateLimiterRes)) throw error;
		const seconds = Math.ceil(error.msBeforeNext / 1000);
		throw new AppError('too-many', `Too many tries. Wait ${seconds} s.`, { retryAfterSeconds: seconds });
	}
}

/** Forgets the tries of an address that got in. */
export const forgiveSignIn = (email: string, sender: string): Promise<boolean> =>
	signIn.delete(`${email.toLowerCase()} ${sender}`);
