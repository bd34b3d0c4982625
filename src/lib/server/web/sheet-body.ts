import { AppError } from '$lib/model/errors';

const MOST = 5 * 1024 * 1024;

/** The bytes of a small sheet. @throws AppError `too-large`, `invalid` */
export async function sheetOf(request: Request): Promise<Uint8Array> {
	const bytes = new Uint8Array(await request.arrayBuffer());
	if (bytes.length > MOST) throw new AppError('too-large', 'A sheet of sites and units may have 5 MiB at most.');
	if (bytes.length === 0) throw new AppError('invalid', 'The sheet is empty.');
	return bytes;
}
