import { AppError } from '$lib/model/errors';
import { dropUpload, takePart, uploadOf } from '$lib/server/services/uploads';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/logs';
import { Readable } from 'node:stream';

export const GET = endpoint(operations.getUpload, ({ actor, params }) => uploadOf(actor, params.upload ?? ''));

export const PUT = endpoint(operations.sendPart, ({ actor, params, query, event }) => {
	const { body } = event.request;
	if (!body) throw new AppError('invalid', 'The part is empty, or its Content-Type is missing.');
	const bytes = Readable.fromWeb(body as Parameters<typeof Readable.fromWeb>[0]);
	return takePart(actor, params.upload ?? '', query, bytes);
});

export const DELETE = endpoint(operations.dropUpload, ({ actor, params }) => dropUpload(actor, params.upload ?? ''));
