import { MAIL_KINDS } from '$lib/model/mail';
import { unsubscribe, unsubscribeOf } from '$lib/server/services/mails';

export const load = async ({ url }) => {
	const found = await unsubscribeOf(url.searchParams.get('token') ?? '');
	return { about: found && { words: MAIL_KINDS[found.kind].words, email: found.email } };
};

export const actions = {
	/** The button of the page, and a mail program's one click (RFC 8058). */
	default: async ({ url }) => ({ done: await unsubscribe(url.searchParams.get('token') ?? '') })
};
