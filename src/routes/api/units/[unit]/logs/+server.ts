import { receiveUpload } from '$lib/server/services/incoming';
import { logsOf, takeLog } from '$lib/server/services/logs';
import { unitOf } from '$lib/server/services/units';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/logs';
import { pageOf } from '$lib/server/web/paging';

export const GET = endpoint(operations.listLogs, async ({ actor, params, query }) => {
	const { page, nextCursor } = pageOf(await logsOf(actor, params.unit ?? ''), query);
	return { logs: page, nextCursor };
});

export const POST = endpoint(operations.addLog, async ({ actor, params, query, event }) => {
	const unitId = params.unit ?? '';
	// The unit is looked up before the bytes are taken: an upload to nowhere costs nothing.
	await unitOf(actor, unitId);
	const files = await receiveUpload(event.request, query.name ?? 'log');
	const log = await takeLog(actor, unitId, files, {
		timeZone: query.timeZone ?? null,
		mapping: query.mapping,
		name: query.name ?? null
	});
	const headers = { 'content-type': 'application/json', location: `/api/logs/${log.id}` };
	return new Response(JSON.stringify({ log }), { status: 202, headers });
});
