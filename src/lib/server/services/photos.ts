import { AppError, notFound } from '$lib/model/errors';
import { may, type Actor } from '$lib/model/people';
import type { Photo } from '$lib/model/wire/field';
import { demand } from '$lib/server/auth/guard';
import { recordAudit } from '$lib/server/repositories/audit';
import { findCheck, findCheckByClientKey } from '$lib/server/repositories/circle';
import { findPhoto, findPhotoByClientKey, insertPhoto, listPhotos } from '$lib/server/repositories/photos';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { objectStore } from '$lib/server/store';
import { randomUUID } from 'node:crypto';
import sharp from 'sharp';
import { photoShape } from './check-shapes';
import { visibleUnit } from './units';

/** Photos of a unit: the original is kept as it came, pages show a smaller view without its hidden data. */

const MOST_BYTES = 30 * 1024 * 1024;
const MOST_PIXELS = 100e6;
const VIEW_PIXELS = 1600;
const FORMATS: Readonly<Record<string, string>> = {
	jpeg: 'image/jpeg',
	png: 'image/png',
	webp: 'image/webp',
	gif: 'image/gif',
	tiff: 'image/tiff',
	heif: 'image/avif'
};

export type PhotoInput = {
	clientKey: string | null;
	checkId: string | null;
	/** the client key of the check it belongs to, when its id is not known yet */
	checkKey: string | null;
	caption: string;
	kind: Photo['kind'];
};

/** @throws AppError `unsupported`, `too-large` */
async function viewOf(bytes: Uint8Array): Promise<{ view: Buffer; format: string; width: number; height: number }> {
	if (bytes.length > MOST_BYTES) throw new AppError('too-large', 'A photo may have 30 MiB at most.');
	try {
		const picture = sharp(bytes, { limitInputPixels: MOST_PIXELS, failOn: 'error' });
		const { format } = await picture.metadata();
		if (!format || !(format in FORMATS)) throw new Error(`${format ?? 'this'} is no picture format we read`);
		const { data, info } = await picture
			.rotate()
			.resize({ width: VIEW_PIXELS, height: VIEW_PIXELS, fit: 'inside', withoutEnlargement: true })
			.jpeg({ quality: 80, mozjpeg: true })
			.toBuffer({ resolveWithObject: true });
		return { view: data, format, width: info.width, height: info.height };
	} catch {
		throw new AppError('unsupported', 'This is no picture that can be read: send JPEG, PNG, WebP, AVIF or TIFF.');
	}
}

async function checkOf(tx: Tx, unitId: string, input: PhotoInput): Promise<string | null> {
	if (!input.checkId && !input.checkKey) return null;
	const row = input.checkId ? await findCheck(tx, input.checkId) : await findCheckByClientKey(tx, input.checkKey ?? '');
	if (row?.unitId !== unitId)
		throw new AppError('invalid', 'There is no such check on this unit.', {
			errors: [{ field: 'check', message: 'not there' }]
		});
	return row.id;
}

/** Keeps a photo of a unit; sent twice with one client key, it is kept once. */
export async function addPhoto(
	actor: Actor,
	unitId: string,
	bytes: Uint8Array,
	input: PhotoInput
): Promise<{ photo: Photo; repeated: boolean }> {
	demand(actor, 'field');
	const known = await withOrganisation(actor.organisationId, async (tx) => {
		await visibleUnit(tx, actor, unitId);
		return input.clientKey ? findPhotoByClientKey(tx, input.clientKey) : null;
	});
	if (known) {
		if (known.unitId !== unitId) throw new AppError('conflict', 'This client key came with a photo of another unit.');
		return { photo: photoShape(known), repeated: true };
	}
	const { view, format, width, height } = await viewOf(bytes);
	const id = randomUUID();
	const originalKey = `photos/${actor.organisationId}/${id}.${format}`;
	const viewKey = `photos/${actor.organisationId}/${id}.view.jpeg`;
	await objectStore().keep(originalKey, bytes);
	await objectStore().keep(viewKey, view);
	return withOrganisation(actor.organisationId, async (tx) => {
		const { row, repeated } = await insertPhoto(tx, {
			organisationId: actor.organisationId,
			id,
			clientKey: input.clientKey,
			unitId,
			checkId: await checkOf(tx, unitId, input),
			caption: input.caption || null,
			kind: input.kind,
			originalKey,
			viewKey,
			width,
			height,
			bytes: bytes.length
		});
		if (!repeated) await recordAudit(tx, actor, { action: 'added', subject: 'photo', subjectId: row.id });
		return { photo: photoShape(row), repeated };
	});
}

/** Where a photo's bytes are kept. A client sees those of signed checks. @throws AppError `not-found` */
export async function photoObject(
	actor: Actor,
	id: string,
	which: 'view' | 'original'
): Promise<{ key: string; type: string }> {
	return withOrganisation(actor.organisationId, async (tx) => {
		const row = await findPhoto(tx, id);
		if (!row) throw notFound('photo');
		await visibleUnit(tx, actor, row.unitId);
		if (!may(actor, 'readSuspects')) {
			const check = row.checkId ? await findCheck(tx, row.checkId) : null;
			if (!check?.signedAt) throw notFound('photo');
		}
		const key = which === 'view' ? row.viewKey : row.originalKey;
		return { key, type: FORMATS[key.split('.').at(-1) ?? ''] ?? 'application/octet-stream' };
	});
}

/** A unit's photos that belong to no check. */
export async function photosOf(actor: Actor, unitId: string): Promise<Photo[]> {
	if (!may(actor, 'readSuspects')) return [];
	return withOrganisation(actor.organisationId, async (tx) => {
		await visibleUnit(tx, actor, unitId);
		return (await listPhotos(tx, unitId)).filter((row) => row.checkId === null).map(photoShape);
	});
}
