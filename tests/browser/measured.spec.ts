import { gzipSync } from 'node:zlib';
import { chromium, expect, test, type Browser, type Page, type Response } from '@playwright/test';
import lighthouse, { desktopConfig } from 'lighthouse';
import { origin } from './support/product';
import { signedIn, worst } from './support/walk';

/** What a page costs: script bytes, and the audits of Lighthouse. */

/** Bytes of the scripts a page loads before it is still, each compressed by itself as the server sends it. */
async function scriptsOf(page: Page, path: string): Promise<number> {
	const bodies: Promise<number>[] = [];
	const listen = (answer: Response): void => {
		if (answer.request().resourceType() !== 'script') return;
		bodies.push(answer.body().then((body) => gzipSync(body).length));
	};
	page.on('response', listen);
	await page.goto(`${origin()}${path}`);
	await page.waitForLoadState('networkidle');
	page.off('response', listen);
	return (await Promise.all(bodies)).reduce((sum, bytes) => sum + bytes, 0);
}

/** A context with nothing cached: a first visit loads every script. */
async function fresh(browser: Browser, path: (unit: string, start: string) => string): Promise<number> {
	const first = await signedIn(browser, 'technician');
	const { unit, start } = await worst(first.page);
	const state = await first.context.storageState();
	await first.context.close();
	const context = await browser.newContext({ storageState: state, serviceWorkers: 'block' });
	const bytes = await scriptsOf(await context.newPage(), path(unit.id, start));
	await context.close();
	return bytes;
}

test('the Units page loads at most 120 kB of script', async ({ browser }) => {
	const bytes = await fresh(browser, () => '/');
	console.log(`    Units: ${(bytes / 1000).toFixed(1)} kB of script, gzip`);
	expect(bytes).toBeGreaterThan(10_000);
	expect(bytes).toBeLessThanOrEqual(120_000);
});

test('a start sheet loads at most 260 kB of script', async ({ browser }) => {
	const bytes = await fresh(browser, (unit, start) => `/units/${unit}/starts/${start}`);
	console.log(`    start sheet: ${(bytes / 1000).toFixed(1)} kB of script, gzip`);
	expect(bytes).toBeGreaterThan(10_000);
	expect(bytes).toBeLessThanOrEqual(260_000);
});

test('Lighthouse finds nothing to better in accessibility and practice', async ({ browser }) => {
	test.skip(process.env.TESTS_LONG !== '1', 'takes most of a minute: npm run test:long');
	test.setTimeout(240_000);
	const first = await signedIn(browser, 'technician');
	const { unit, start } = await worst(first.page);
	const cookies = await first.context.cookies();
	await first.context.close();
	const debugged = await chromium.launch({
		executablePath: '/usr/bin/chromium',
		args: ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--remote-debugging-port=9333']
	});
	const below = `/units/${unit.id}`;
	try {
		// Cookies of its own jar, because a page that sets one of its own replaces a header given from outside.
		const attached = await chromium.connectOverCDP('http://127.0.0.1:9333');
		await attached.contexts()[0]?.addCookies(cookies);
		for (const path of ['/', below, `${below}/starts/${start}`, `${below}/checks?kind=oil-level`]) {
			const run = await lighthouse(
				`${origin()}${path}`,
				{
					port: 9333,
					logLevel: 'error',
					disableStorageReset: true,
					onlyCategories: ['accessibility', 'best-practices', 'performance']
				},
				desktopConfig
			);
			const scores = run?.lhr.categories ?? {};
			const failed = Object.values(run?.lhr.audits ?? {})
				.filter((audit) => audit.score !== null && audit.score < 1 && audit.scoreDisplayMode === 'binary')
				.map((audit) => audit.id);
			console.log(`    ${path}: performance ${scores.performance?.score}, below 1: ${failed.join(', ') || 'none'}`);
			expect.soft(scores.accessibility?.score, `${path} accessibility; ${failed.join(', ')}`).toBe(1);
			expect.soft(scores['best-practices']?.score, `${path} best practices; ${failed.join(', ')}`).toBe(1);
			expect.soft(run?.lhr.finalDisplayedUrl, path).toContain(path);
		}
	} finally {
		await debugged.close();
	}
});
