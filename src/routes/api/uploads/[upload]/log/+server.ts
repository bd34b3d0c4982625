import { finishUpload } from '$lib/server/services/uploads';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/logs';

export const POST = endpoint(operations.finishUpload, async ({ actor, params }) => {
	const log = await finishUpload(actor, params.upload ?? '');
	const headers = { 'content-type': 'application/json', location: `/api/logs/${log.id}` };
	return new Response(JSON.stringify({ log }), { status: 202, headers });
});
