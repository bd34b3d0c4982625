import { hash, verify } from '@node-rs/argon2';

// OWASP Password Storage Cheat Sheet, argon2id: m = 19 MiB, t = 2, p = 1. The library's default algorithm is argon2id.
const OPTIONS = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

/** argon2id hash of a password, with its own salt. */
export const hashPassword = (password: string): Promise<string> => hash(password, OPTIONS);

let decoy: Promise<string> | undefined;

/**
 * Is `password` the one behind `stored`? Without a stored hash the same work is done and the answer is no,
 * so that the time taken does not tell whether an address is known.
 */
export async function passwordFits(stored: string | null, password: string): Promise<boolean> {
	decoy ??= hashPassword('nobody has this password');
	const fits = await verify(stored ?? (await decoy), password);
	return stored !== null && fits;
}
