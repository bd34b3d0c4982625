import { invite, membersOf } from '$lib/server/services/members';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';
import { made } from '$lib/server/web/made';

export const GET = endpoint(operations.listMembers, ({ actor }) => membersOf(actor));
export const POST = endpoint(operations.invite, async ({ actor, body }) => {
	await invite(actor, body);
	return made(await membersOf(actor), '/api/members');
});
