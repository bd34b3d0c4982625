import { z } from 'zod';
import { LEAST_PASSWORD } from '../people';

/** The forms of those who are not signed in yet. */

/** A password that somebody chooses. */
export const passwordSchema = z
	.string()
	.min(LEAST_PASSWORD, `${LEAST_PASSWORD} characters at least.`)
	.max(500, '500 characters at most.');

export const askResetSchema = z.object({ email: z.email('This is no e-mail address.') });
export const resetSchema = z.object({ token: z.string(), password: passwordSchema });
export const acceptSchema = z.object({
	token: z.string(),
	name: z.string().trim().min(1, 'Give your name.').max(120),
	password: passwordSchema
});
/** A link of a message, opened by somebody who needs to give nothing more. */
export const linkSchema = z.object({ token: z.string() });
/** The first visit: the office and its owner, with the code that the start command printed. */
export const foundSchema = z.object({
	code: z.string().trim().min(1, 'Give the code that the start command printed.'),
	office: z.string().trim().min(1, 'Give the office a name.').max(120),
	name: z.string().trim().min(1, 'Give your name.').max(120),
	email: z.email('This is no e-mail address.'),
	password: passwordSchema
});
