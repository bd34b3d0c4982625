import { openOriginal } from '$lib/server/services/originals';

/** A kept picture; it may never run as anything else. */
export function pictureAnswer({ key, type }: { key: string; type: string }): Response {
	return new Response(openOriginal(key), {
		headers: {
			'content-type': type,
			'cache-control': 'private, max-age=31536000, immutable',
			'content-security-policy': "default-src 'none'; sandbox"
		}
	});
}
