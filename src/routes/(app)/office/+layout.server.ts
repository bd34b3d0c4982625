import { may } from '$lib/model/people';
import { sitesOf } from '$lib/server/services/sites';
import { actorOf } from '$lib/server/web/endpoint';
import { error } from '@sveltejs/kit';

export const load = async (event) => {
	const actor = actorOf(event);
	if (!may(actor, 'readOffice')) error(403, { message: 'The office is for its owner and its managers.' });
	const sites = (await sitesOf(actor)).map(({ id, name, onCallId, contacts, accessNotes }) => ({
		id,
		name,
		onCallId: onCallId ?? null,
		contacts: contacts ?? [],
		accessNotes: accessNotes ?? null
	}));
	return { owner: may(actor, 'office'), sites };
};
