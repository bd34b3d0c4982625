import { beginUpload, openUploadsOf } from '$lib/server/services/uploads';
import { endpoint } from '$lib/server/web/endpoint';
import { made } from '$lib/server/web/made';
import * as operations from '$lib/server/web/operations/logs';

export const GET = endpoint(operations.listUploads, async ({ actor, params }) => ({
	uploads: await openUploadsOf(actor, params.unit ?? '')
}));

export const POST = endpoint(operations.beginUpload, async ({ actor, params, body }) => {
	const { upload, repeated } = await beginUpload(actor, params.unit ?? '', body);
	return made(upload, `/api/uploads/${upload.id}`, repeated);
});
