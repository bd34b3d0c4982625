export const GET = () =>
	new Response('alive\n', { headers: { 'content-type': 'text/plain', 'cache-control': 'no-store' } });
