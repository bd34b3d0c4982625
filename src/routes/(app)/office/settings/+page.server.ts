import { colleaguesOf } from '$lib/server/services/people';
import { settingsOf } from '$lib/server/services/office';
import { actorOf } from '$lib/server/web/endpoint';
import { error } from '@sveltejs/kit';

export const load = async (event) => {
	if (!(await event.parent()).owner) error(403, { message: 'Settings of the office are the owner’s.' });
	const actor = actorOf(event);
	return { settings: await settingsOf(actor), colleagues: await colleaguesOf(actor) };
};
