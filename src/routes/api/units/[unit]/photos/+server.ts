import { addPhoto, photosOf } from '$lib/server/services/photos';
import { endpoint } from '$lib/server/web/endpoint';
import { made } from '$lib/server/web/made';
import * as operations from '$lib/server/web/operations/circle';
import { pictureOf } from '$lib/server/web/picture-body';

export const GET = endpoint(operations.listPhotos, async ({ actor, params }) => ({
	photos: await photosOf(actor, params.unit ?? '')
}));

export const POST = endpoint(operations.addPhoto, async ({ actor, params, query, event }) => {
	const { photo, repeated } = await addPhoto(actor, params.unit ?? '', await pictureOf(event.request), {
		clientKey: query.clientKey ?? null,
		checkId: query.check ?? null,
		checkKey: query.checkKey ?? null,
		caption: query.caption,
		kind: query.kind
	});
	return made(photo, photo.view, repeated);
});
