import { openApiDocument } from '$lib/server/web/openapi';

export const GET = ({ url }: { url: URL }) =>
	new Response(JSON.stringify(openApiDocument(url.origin)), {
		headers: { 'content-type': 'application/json', 'cache-control': 'public, max-age=300' }
	});
