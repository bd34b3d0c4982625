import { readiness } from '$lib/server/services/health';

export const GET = async () => {
	const parts = await readiness();
	const ready = Object.values(parts).every(Boolean);
	return new Response(JSON.stringify({ ready, ...parts }), {
		status: ready ? 200 : 503,
		headers: { 'content-type': 'application/json', 'cache-control': 'no-store' }
	});
};
