import { demand } from '$lib/server/auth/guard';
import { metricsText } from '$lib/server/services/metrics';
import { actorOf } from '$lib/server/web/endpoint';
import { errorResponse } from '$lib/server/web/problem';
import type { RequestHandler } from './$types';

/** Prometheus text, with a key of somebody who may read the office. */
export const GET: RequestHandler = async (event) => {
	try {
		demand(actorOf(event), 'readOffice');
		const { text, type } = await metricsText();
		return new Response(text, { headers: { 'content-type': type, 'cache-control': 'no-store' } });
	} catch (error) {
		return errorResponse(error);
	}
};
