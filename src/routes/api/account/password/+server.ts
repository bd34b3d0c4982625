import { SESSION_COOKIE } from '$lib/server/auth/sessions';
import { changePassword } from '$lib/server/services/account';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const POST = endpoint(operations.changePassword, ({ actor, body, event }) =>
	changePassword(actor, body.old, body.password, event.cookies.get(SESSION_COOKIE) ?? null)
);
