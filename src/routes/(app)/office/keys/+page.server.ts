import { keysOf } from '$lib/server/services/keys';
import { actorOf } from '$lib/server/web/endpoint';
import { error } from '@sveltejs/kit';

export const load = async (event) => {
	if (!(await event.parent()).owner) error(403, { message: 'API keys are the owner’s.' });
	return { keys: await keysOf(actorOf(event)) };
};
