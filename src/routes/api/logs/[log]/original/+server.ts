import { notFound } from '$lib/model/errors';
import { logRowOf } from '$lib/server/services/logs';
import { openOriginal } from '$lib/server/services/originals';
import { endpoint } from '$lib/server/web/endpoint';
import { originalLog } from '$lib/server/web/operations/logs';

export const GET = endpoint(originalLog, async ({ actor, params, query }) => {
	const row = await logRowOf(actor, params.log ?? '');
	const file = row.files[query.file];
	if (!file) throw notFound('file');
	const name = encodeURIComponent(file.name);
	return new Response(openOriginal(file.key), {
		headers: {
			'content-type': 'application/octet-stream',
			'content-length': String(file.bytes),
			'content-disposition': `attachment; filename*=UTF-8''${name}`
		}
	});
});
