import { changeSettings, endOffice, settingsOf } from '$lib/server/services/office';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const GET = endpoint(operations.getOffice, ({ actor }) => settingsOf(actor));
export const PATCH = endpoint(operations.changeOffice, ({ actor, body }) => {
	const given = Object.entries(body).filter(([, value]) => value !== undefined);
	return changeSettings(actor, Object.fromEntries(given));
});
export const DELETE = endpoint(operations.endOffice, ({ actor, body }) => endOffice(actor, body));
