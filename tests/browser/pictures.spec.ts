import { expect, test, type Page } from '@playwright/test';
import { difference, drawnHere, record, recorded } from './support/pictures';
import { origin } from './support/product';
import { inPaper, signedIn, worst, type Paper } from './support/walk';

/**
 * The main screens as pictures, compared with recorded ones: fixed clock, the demo's seeded logs, the same Chromium.
 * `RECORD_PICTURES=1` records them anew; look at each before it is committed.
 */
const SCREENS: Record<string, (unit: string, start: string) => string> = {
	units: () => '/',
	days: (unit) => `/units/${unit}`,
	starts: (unit) => `/units/${unit}/starts`,
	'start-sheet': (unit, start) => `/units/${unit}/starts/${start}`,
	nights: (unit) => `/units/${unit}/nights`,
	'side-by-side': (unit) => `/units/${unit}/side-by-side`,
	suspects: (unit) => `/units/${unit}/suspects`,
	checks: (unit) => `/units/${unit}/checks`,
	logs: (unit) => `/units/${unit}/logs`,
	cases: () => '/cases'
};

async function open(page: Page, path: string): Promise<void> {
	await page.goto(`${origin()}${path}`);
	await page.waitForLoadState('networkidle');
	await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
	await page.evaluate(() => document.fonts.ready);
}
const picture = (page: Page): Promise<Buffer> => page.screenshot({ animations: 'disabled', caret: 'hide' });

for (const size of ['desk', 'phone'] as const)
	test(`the main screens look as recorded at the ${size} in both papers`, async ({ browser }) => {
		test.setTimeout(240_000);
		const version = browser.version();
		const recording = process.env.RECORD_PICTURES === '1';
		test.skip(!recording && !drawnHere(version), `the pictures were drawn by another Chromium than ${version}`);
		const { context, page } = await signedIn(browser, 'engineer', size);
		const { unit, start } = await worst(page);
		for (const [screen, path] of Object.entries(SCREENS)) {
			await open(page, path(unit.id, start));
			for (const paper of ['day', 'night'] satisfies Paper[]) {
				await inPaper(page, paper);
				const name = `${screen}-${size}-${paper}`;
				const now = await picture(page);
				if (recording) await record(name, now, version);
				const before = recorded(name);
				expect.soft(before ? await difference(before, now) : 'no picture is recorded', name).toBeNull();
			}
		}
		await context.close();
	});

test('a strip that stands one pixel off is seen', async ({ browser }) => {
	const { context, page } = await signedIn(browser, 'engineer');
	const { unit, start } = await worst(page);
	await open(page, `/units/${unit.id}/starts/${start}`);
	const right = await picture(page);
	expect(await difference(right, await picture(page))).toBeNull();
	await page
		.locator('[data-strip]')
		.nth(1)
		.evaluate((strip) => (strip.style.transform = 'translateY(1px)'));
	expect(await difference(right, await picture(page))).not.toBeNull();
	await context.close();
});
