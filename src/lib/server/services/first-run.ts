import { AppError } from '$lib/model/errors';
import { hashToken, randomToken } from '$lib/server/auth/tokens';
import { config, now } from '$lib/server/config';
import { countOrganisations } from '$lib/server/repositories/identity';
import { findToken, insertToken, useToken } from '$lib/server/repositories/tokens';
import type { foundSchema } from '$lib/model/wire/entry';
import type { z } from 'zod';
import { demandLength, foundOrganisation } from './people';

/** Is there no organisation yet, and no demo to bring one? */
export async function isFirstRun(): Promise<boolean> {
	return !config().DEMO && (await countOrganisations()) === 0;
}

/** The demo's sign-ins, shown on the sign-in page while the demo is on. */
export async function demoSignIns(): Promise<{ emails: string[]; password: string } | null> {
	if (!config().DEMO) return null;
	return {
		emails: ['owner', 'engineer', 'technician', 'manager', 'client'].map((name) => `${name}@firstpull.test`),
		password: DEMO_PASSWORD
	};
}

/** The password of every member of the demo; README.md gives it too. */
export const DEMO_PASSWORD = 'cold-start-0600';

const DAY = 86_400_000;

/** Makes the one-time code that the first visit asks for; the start command prints it. Null once there is an organisation. */
export async function firstRunCode(): Promise<string | null> {
	if (!(await isFirstRun())) return null;
	const code = randomToken().slice(0, 16);
	await insertToken({ tokenHash: hashToken(code), kind: 'first-owner', expiresAt: new Date(now().getTime() + DAY) });
	return code;
}

/** Makes the organisation and its owner with the code. @throws AppError `invalid` that names the field, `conflict` */
export async function foundWithCode(input: z.output<typeof foundSchema>): Promise<void> {
	if (!(await isFirstRun())) throw new AppError('conflict', 'There is an organisation already. Sign in.');
	const { code, office, ...owner } = input;
	demandLength(owner.password);
	const token = await findToken(hashToken(code), 'first-owner', now());
	if (!token || !(await useToken(token.tokenHash, now())))
		throw new AppError('invalid', 'This code is wrong or has expired. Start again for a new one.', {
			errors: [{ field: 'code', message: 'wrong' }]
		});
	await foundOrganisation(office, owner);
}
