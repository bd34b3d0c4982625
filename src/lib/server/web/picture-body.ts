import { AppError } from '$lib/model/errors';

const MOST = 32 * 1024 * 1024;

/** The bytes of a picture: the body itself, or its part “file”. @throws AppError `too-large`, `invalid` */
export async function pictureOf(request: Request): Promise<Uint8Array> {
	if (Number(request.headers.get('content-length') ?? 0) > MOST)
		throw new AppError('too-large', 'A photo may have 30 MiB at most.');
	const multipart = request.headers.get('content-type')?.startsWith('multipart/form-data') ?? false;
	const part = multipart ? (await request.formData()).get('file') : await request.blob();
	if (!(part instanceof Blob) || part.size === 0)
		throw new AppError('invalid', 'The picture is missing: send it as the body, or as the part “file”.');
	return new Uint8Array(await part.arrayBuffer());
}
