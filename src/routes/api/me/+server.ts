import { changePreferences, describeMe } from '$lib/server/services/people';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/people';

export const GET = endpoint(operations.getMe, ({ actor, event }) => describeMe(actor, event.locals.preferences));

export const PATCH = endpoint(operations.changeMe, async ({ actor, body, event }) => {
	const preferences = await changePreferences(actor, { ...event.locals.preferences, ...body });
	return describeMe(actor, preferences);
});
