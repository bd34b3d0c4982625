import { changesOf, recordChange } from '$lib/server/services/changes';
import { endpoint } from '$lib/server/web/endpoint';
import { made } from '$lib/server/web/made';
import * as operations from '$lib/server/web/operations/circle';
import { pageOf } from '$lib/server/web/paging';

export const GET = endpoint(operations.listChanges, async ({ actor, params, query }) => {
	const { changes, ...balances } = await changesOf(actor, params.unit ?? '');
	const { page, nextCursor } = pageOf(changes, query);
	return { changes: page, ...balances, nextCursor };
});

export const POST = endpoint(operations.addChange, async ({ actor, params, body }) => {
	const { change, repeated } = await recordChange(actor, params.unit ?? '', body);
	return made(change, `/api/units/${change.unitId}/changes`, repeated);
});
