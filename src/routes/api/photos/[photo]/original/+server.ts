import { photoObject } from '$lib/server/services/photos';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/circle';
import { pictureAnswer } from '$lib/server/web/picture-answer';

export const GET = endpoint(operations.originalPhoto, async ({ actor, params }) =>
	pictureAnswer(await photoObject(actor, params.photo ?? '', 'original'))
);
