import { SESSION_COOKIE } from '$lib/server/auth/sessions';
import { enterOffice } from '$lib/server/services/account';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const PUT = endpoint(operations.enterOffice, ({ actor, body, event }) =>
	enterOffice(actor, body.id, event.cookies.get(SESSION_COOKIE) ?? null)
);
