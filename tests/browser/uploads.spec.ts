import { expect, test, type Page } from '@playwright/test';
import { origin } from './support/product';
import { api, signedIn, worst } from './support/walk';

/** A big log on a bad connection: it goes on where it stopped, by itself and after a reload. */

/** Invented: a log of some MB, so that it goes in parts. */
function bigLog(megabytes: number, seed: number): Buffer {
	const lines = ['Time,Compressor Running,Leaving Water (°C),Oil Temp (°C),Motor Current (A)'];
	let size = 0;
	for (let i = 0; size < megabytes * 1024 * 1024; i++) {
		const at = new Date(Date.UTC(2024, 0, 1) + i * 5000).toISOString().slice(0, 19).replace('T', ' ');
		const on = Math.floor(i / 900) % 2;
		const line = `${at},${on},${(7 + ((i * seed) % 97) / 100).toFixed(2)},${(40 + (i % 53) / 10).toFixed(1)},${on * 180}`;
		lines.push(line);
		size += line.length + 1;
	}
	return Buffer.from(lines.join('\n'));
}

async function choose(page: Page, name: string, buffer: Buffer): Promise<void> {
	await page.waitForLoadState('networkidle');
	await page.locator('input[type=file]').first().setInputFiles({ name, mimeType: 'text/csv', buffer });
}
const isPart = (url: URL): boolean => /\/api\/uploads\/[^/]+$/.test(url.pathname) && url.searchParams.has('from');

test('a big log goes on by itself when the connection breaks', async ({ browser }) => {
	const { context, page } = await signedIn(browser, 'engineer', 'phone');
	const { unit } = await worst(page);
	const bytes = bigLog(9, 31);
	let parts = 0;
	await page.route(isPart, async (route) => {
		parts++;
		if (parts === 2) await route.abort('connectionreset');
		else await route.continue();
	});
	await page.goto(`${origin()}/units/${unit.id}/logs`);
	await choose(page, 'broken.csv', bytes);
	await expect(page.getByText(/the connection is gone/)).toBeVisible({ timeout: 20_000 });
	await expect(async () => {
		expect(parts).toBeGreaterThanOrEqual(4);
		const { logs } = await api<{ logs: { name: string; bytes: number }[] }>(page, `/api/units/${unit.id}/logs`);
		expect(logs.find((log) => log.name === 'broken.csv')?.bytes).toBe(bytes.length);
	}).toPass({ timeout: 40_000 });
	await context.close();
});

test('a big log goes on after the page was closed', async ({ browser }) => {
	const { context, page } = await signedIn(browser, 'engineer');
	const { unit } = await worst(page);
	const bytes = bigLog(9, 37);
	let parts = 0;
	await page.route(isPart, async (route) => {
		parts++;
		if (parts >= 2) await route.abort('connectionreset');
		else await route.continue();
	});
	await page.goto(`${origin()}/units/${unit.id}/logs`);
	await choose(page, 'half.csv', bytes);
	await expect(page.getByText(/the connection is gone/)).toBeVisible({ timeout: 20_000 });
	await page.unrouteAll({ behavior: 'ignoreErrors' });
	await page.goto(`${origin()}/units/${unit.id}`);
	await page.goto(`${origin()}/units/${unit.id}/logs`);
	await expect(page.getByText('Stopped half way')).toBeVisible({ timeout: 10_000 });
	await choose(page, 'half.csv', bytes);
	await expect(page.getByText(/sending on from/)).toBeVisible({ timeout: 10_000 });
	await expect(async () => {
		const { logs } = await api<{ logs: { name: string; bytes: number }[] }>(page, `/api/units/${unit.id}/logs`);
		expect(logs.find((log) => log.name === 'half.csv')?.bytes).toBe(bytes.length);
	}).toPass({ timeout: 40_000 });
	await expect(page.getByText('Stopped half way')).toHaveCount(0);
	await context.close();
});
