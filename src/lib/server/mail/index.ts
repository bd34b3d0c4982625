import { config } from '$lib/server/config';
import { smtpMailer } from './smtp';
import type { Mailer } from './types';

export type { Mailer } from './types';

let opened: Mailer | undefined;

/** The mailer that the settings name. @throws Error when no mail server is set */
export function mailer(): Mailer {
	const { SMTP_URL, MAIL_FROM } = config();
	if (!SMTP_URL) throw new Error('No mail server is set: give SMTP_URL.');
	opened ??= smtpMailer(SMTP_URL, MAIL_FROM);
	return opened;
}
