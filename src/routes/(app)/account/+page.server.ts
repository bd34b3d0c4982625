import { SESSION_COOKIE } from '$lib/server/auth/sessions';
import { accountOf } from '$lib/server/services/account';
import { actorOf } from '$lib/server/web/endpoint';

export const load = async (event) => ({
	account: await accountOf(actorOf(event), event.cookies.get(SESSION_COOKIE) ?? null),
	twoStepDue: event.locals.twoStepDue
});
