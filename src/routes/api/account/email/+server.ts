import { askEmailChange } from '$lib/server/services/account';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const POST = endpoint(operations.askEmailChange, ({ actor, body }) =>
	askEmailChange(actor, body.email, body.password)
);
