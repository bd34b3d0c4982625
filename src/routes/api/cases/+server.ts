import { may } from '$lib/model/people';
import { caseSuggestions } from '$lib/server/services/case-suggestions';
import { casesOf, openCase } from '$lib/server/services/cases';
import { endpoint } from '$lib/server/web/endpoint';
import { made } from '$lib/server/web/made';
import * as operations from '$lib/server/web/operations/circle';
import { pageOf } from '$lib/server/web/paging';

export const GET = endpoint(operations.listCases, async ({ actor, query }) => {
	const filter = { open: query.open === 'yes', ...(query.unit ? { unit: query.unit } : {}) };
	const { page, nextCursor } = pageOf(await casesOf(actor, filter), query);
	if (query.suggestions === 'no' || !may(actor, 'readSuspects')) return { cases: page, nextCursor };
	return { cases: page, suggestions: await caseSuggestions(actor), nextCursor };
});

export const POST = endpoint(operations.openCase, async ({ actor, body, units }) => {
	const opened = await openCase(actor, body, units);
	return made(opened, `/api/cases/${opened.id}`);
});
