import { AppError } from '$lib/model/errors';

/**
 * One page of a list and the cursor of the next (null at the end). The cursor is an offset, opaque to callers.
 * @throws AppError `invalid` for a cursor that is none of ours
 */
export function pageOf<T>(
	items: readonly T[],
	query: { limit: number; cursor?: string | undefined }
): { page: T[]; nextCursor: string | null } {
	const offset = query.cursor ? Number(Buffer.from(query.cursor, 'base64url').toString().replace(/^at:/, '')) : 0;
	if (!Number.isInteger(offset) || offset < 0)
		throw new AppError('invalid', 'This cursor is not one of ours.', {
			errors: [{ field: 'cursor', message: 'unknown' }]
		});
	const end = offset + query.limit;
	return {
		page: items.slice(offset, end),
		nextCursor: end < items.length ? Buffer.from(`at:${end}`).toString('base64url') : null
	};
}
