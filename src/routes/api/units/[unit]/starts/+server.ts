import { startsOf } from '$lib/server/services/starts';
import { endpoint } from '$lib/server/web/endpoint';
import { listStarts } from '$lib/server/web/operations/starts';
import { pageOf } from '$lib/server/web/paging';

export const GET = endpoint(listStarts, async ({ actor, params, query, units }) => {
	const filter = {
		source: query.source,
		...(query.from ? { from: Date.parse(query.from) } : {}),
		...(query.to ? { to: Date.parse(query.to) } : {}),
		...(query.outcome ? { outcome: query.outcome } : {}),
		...(query.circuit ? { circuit: query.circuit } : {})
	};
	const { page, nextCursor } = pageOf(await startsOf(actor, params.unit ?? '', filter, units), query);
	return { starts: page, nextCursor };
});
