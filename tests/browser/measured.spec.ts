import { gzipSync } from 'node:zlib';
import { chromium, expect, test, type Browser, type Page, type Response } from '@playwright/test';
import lighthouse, { desktopConfig } from 'lighthouse';
import { origin } from './support/product';
import { signedIn, worst } from './support/walk';

/** What a page costs and how still it stands: script bytes, layout shift, and the audits of Lighthouse. */

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

/** Sum of the layout shifts since the page was opened (Layout Instability, W3C draft; no shift after an input counts). */
async function shiftOf(page: Page, path: string): Promise<number> {
	await page.goto(`${origin()}${path}`);
	await page.waitForLoadState('networkidle');
	return page.evaluate(
		() =>
			new Promise<number>((done) => {
				let sum = 0;
				const seen = new PerformanceObserver((list) => {
					for (const entry of list.getEntries() as (PerformanceEntry & { value: number; hadRecentInput: boolean })[])
						if (!entry.hadRecentInput) sum += entry.value;
				});
				seen.observe({ type: 'layout-shift', buffered: true });
				setTimeout(() => done(sum), 300);
			})
	);
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

for (const size of ['desk', 'phone'] as const)
	test(`nothing moves while a page fills, at the ${size}`, async ({ browser }) => {
		test.setTimeout(120_000);
		const { context, page } = await signedIn(browser, 'engineer', size);
		const { unit, start } = await worst(page);
		const below = `/units/${unit.id}`;
		const sheets = ['', '/starts', `/starts/${start}`, '/nights', '/side-by-side', '/suspects', '/checks', '/logs'];
		for (const path of ['/', ...sheets.map((sheet) => `${below}${sheet}`), '/cases', '/visits', '/office', '/method'])
			expect.soft(await shiftOf(page, path), path).toBeLessThanOrEqual(0.02);
		await context.close();
	});

test('Lighthouse finds nothing to better in accessibility and practice', async ({ browser }) => {
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
