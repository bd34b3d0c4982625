import { expect, test } from '@playwright/test';
import { origin } from './support/product';
import { signedIn, type Summary } from './support/walk';

test('a client sees own sites only, read only, and no suspect that nobody has signed', async ({ browser }) => {
	const owner = await signedIn(browser, 'owner');
	const client = await signedIn(browser, 'client');
	const get = (page: typeof client.page, path: string) => page.request.get(`${origin()}${path}`);
	const all = ((await (await get(owner.page, '/api/units?view=summary')).json()) as { units: Summary[] }).units;
	const own = ((await (await get(client.page, '/api/units?view=summary')).json()) as { units: Summary[] }).units;
	expect(own.length).toBeGreaterThan(0);
	expect(own.length).toBeLessThan(all.length);
	const foreign = all.find((entry) => !own.some((mine) => mine.unit.id === entry.unit.id));
	for (const path of ['', '/starts', '/logs', '/days']) {
		expect((await get(client.page, `/api/units/${foreign?.unit.id}${path}`)).status(), path).toBe(404);
	}
	expect((await get(client.page, '/api/keys')).status()).toBe(403);
	const post = await client.page.request.post(`${origin()}/api/sites`, {
		data: { name: 'x', timeZone: 'UTC' },
		headers: { origin: origin() }
	});
	expect(post.status()).toBe(403);
	await owner.context.close();
	await client.context.close();
});

test('calls without identity are 401 with problem details, and a foreign origin is refused', async ({
	browser,
	request
}) => {
	const answer = await request.get(`${origin()}/api/units`);
	expect(answer.status()).toBe(401);
	expect(answer.headers()['content-type']).toContain('application/problem+json');
	const { context, page } = await signedIn(browser, 'owner');
	const foreign = await page.request.post(`${origin()}/api/sites`, {
		data: { name: 'x', timeZone: 'UTC' },
		headers: { origin: 'https://elsewhere.test' }
	});
	expect(foreign.status()).toBe(403);
	await context.close();
});

test('the OpenAPI document names the fixed calls', async ({ request }) => {
	const document = (await (await request.get(`${origin()}/api/openapi.json`)).json()) as {
		openapi: string;
		paths: Record<string, Record<string, unknown>>;
	};
	expect(document.openapi).toMatch(/^3\.1/);
	const fixed = [
		'/api/sites',
		'/api/sites/{site}',
		'/api/units',
		'/api/units/{unit}',
		'/api/units/{unit}/logs',
		'/api/logs/{log}',
		'/api/logs/{log}/progress',
		'/api/logs/{log}/mapping',
		'/api/units/{unit}/starts',
		'/api/starts/{start}',
		'/api/starts/{start}/traces',
		'/api/units/{unit}/traces',
		'/api/units/{unit}/comparison',
		'/api/units/{unit}/suspects',
		'/api/units/{unit}/checks',
		'/api/units/{unit}/changes',
		'/api/units/{unit}/proof',
		'/api/units/{unit}/nights',
		'/api/starts/{start}/first-mover',
		'/api/repeaters',
		'/api/cases',
		'/api/cases/{case}',
		'/api/visits'
	];
	expect(fixed.filter((path) => !(path in document.paths))).toEqual([]);
});
