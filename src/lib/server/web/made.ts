/** The answer to a call that made something: 201 with its address, or 200 when the same call made it before. */
export function made(body: unknown, location: string, repeated = false): Response {
	return new Response(JSON.stringify(body), {
		status: repeated ? 200 : 201,
		headers: { 'content-type': 'application/json', 'cache-control': 'no-store', location }
	});
}
