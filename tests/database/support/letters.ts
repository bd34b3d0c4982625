import type { Office } from './office';
import { plainText, type Post } from './post';

/** Sends what waits in an office's outbox, as the worker's job does. */
export async function deliver(office: Pick<Office, 'organisationId' | 'owner'>): Promise<void> {
	const { mailsOf, sendMail } = await import('$lib/server/services/mails');
	for (const { id, state } of await mailsOf(office.owner))
		if (state !== 'sent') await sendMail({ organisationId: office.organisationId, mailId: id }).catch(() => undefined);
}

/** The secret of the newest link to a page that a message to an address has; an empty text when there is none. */
export function linkIn(messages: Post['messages'], to: string, page: string): string {
	const found = messages.filter((message) => message.to.includes(to)).at(-1);
	return new RegExp(`/${page}\\?token=([\\w-]+)`).exec(plainText(found?.raw ?? ''))?.[1] ?? '';
}
