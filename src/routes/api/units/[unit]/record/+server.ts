import { recordNoted, recordOf } from '$lib/server/services/noted';
import { endpoint } from '$lib/server/web/endpoint';
import { made } from '$lib/server/web/made';
import * as operations from '$lib/server/web/operations/starts';

export const GET = endpoint(operations.getRecord, ({ actor, params, units }) =>
	recordOf(actor, params.unit ?? '', units)
);

export const POST = endpoint(operations.addNoted, async ({ actor, params, body }) => {
	const unitId = params.unit ?? '';
	const { id, repeated } = await recordNoted(actor, unitId, body);
	return made({ id }, `/api/units/${unitId}/record`, repeated);
});
