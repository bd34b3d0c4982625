import { changeMember, endMembership, membersOf } from '$lib/server/services/members';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const PATCH = endpoint(operations.changeMember, async ({ actor, params, body }) => {
	await changeMember(actor, params.member ?? '', body);
	return membersOf(actor);
});
export const DELETE = endpoint(operations.endMembership, ({ actor, params }) =>
	endMembership(actor, params.member ?? '')
);
