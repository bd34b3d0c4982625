import { checksOf, recordCheck } from '$lib/server/services/checks';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/circle';
import { pageOf } from '$lib/server/web/paging';
import { made } from '$lib/server/web/made';

export const GET = endpoint(operations.listChecks, async ({ actor, params, query, units }) => {
	const { page, nextCursor } = pageOf(await checksOf(actor, params.unit ?? '', units), query);
	return { checks: page, nextCursor };
});

export const POST = endpoint(operations.addCheck, async ({ actor, params, body, units }) => {
	const { check, repeated } = await recordCheck(actor, params.unit ?? '', body, units);
	return made(check, `/api/units/${check.unitId}/checks`, repeated);
});
