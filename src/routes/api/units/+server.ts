import { unitSummaries } from '$lib/server/services/summaries';
import { addUnit, unitsOf } from '$lib/server/services/units';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/plant';
import { pageOf } from '$lib/server/web/paging';

export const GET = endpoint(operations.listUnits, async ({ actor, query }) => {
	if (query.view === 'summary') {
		const { units, title } = await unitSummaries(actor, query.site);
		const { page, nextCursor } = pageOf(units, query);
		return { units: page, title, nextCursor };
	}
	const { page, nextCursor } = pageOf(await unitsOf(actor, query.site), query);
	return { units: page, nextCursor };
});

export const POST = endpoint(operations.addUnit, ({ actor, body }) => addUnit(actor, body));
