import { exportSamples } from '$lib/server/services/export';
import { endpoint } from '$lib/server/web/endpoint';
import { exportUnit } from '$lib/server/web/operations/logs';

export const GET = endpoint(exportUnit, async ({ actor, params, query, units }) => {
	const { body, name, type } = await exportSamples(actor, params.unit ?? '', query, units);
	return new Response(body, {
		headers: { 'content-type': type, 'content-disposition': `attachment; filename*=UTF-8''${encodeURIComponent(name)}` }
	});
});
