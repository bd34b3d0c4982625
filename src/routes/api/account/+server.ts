import { SESSION_COOKIE } from '$lib/server/auth/sessions';
import { accountOf, changeAccount } from '$lib/server/services/account';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const GET = endpoint(operations.getAccount, ({ actor, event }) =>
	accountOf(actor, event.cookies.get(SESSION_COOKIE) ?? null)
);
export const PATCH = endpoint(operations.changeAccount, async ({ actor, body, event }) => {
	await changeAccount(actor, body);
	return accountOf(actor, event.cookies.get(SESSION_COOKIE) ?? null);
});
