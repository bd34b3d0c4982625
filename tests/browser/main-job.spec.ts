import { expect, test, type Page } from '@playwright/test';
import { knownCases } from '../../fixtures/known/index';
import { origin } from './support/product';
import { api, signedIn, worst } from './support/walk';

/** The whole path: upload, confirm the mapping, open the tripped start, read its figures, compare with a held one. */

/** Adds a unit through the API, as the page's own session. */
async function addUnit(page: Page, tag: string): Promise<string> {
	const post = async (path: string, data: unknown) => {
		const answer = await page.request.post(`${origin()}${path}`, { data, headers: { origin: origin() } });
		expect(answer.status(), await answer.text()).toBe(201);
		return (await answer.json()) as { id: string };
	};
	const site = await post('/api/sites', { name: `Works of ${tag}`, timeZone: 'UTC' });
	const known = knownCases()[0];
	const unit = await post('/api/units', {
		siteId: site.id,
		tag,
		refrigerant: known?.refrigerant,
		circuits: 1,
		nature: known?.nature,
		limits: known?.limits
	});
	return unit.id;
}

test('a log is dropped, its mapping confirmed, and its tripped start read', async ({ browser }) => {
	const { context, page, errors } = await signedIn(browser, 'technician', 'phone');
	const owner = await signedIn(browser, 'owner');
	const unitId = await addUnit(owner.page, 'Known 1');
	const known = knownCases()[0];
	await page.goto(`${origin()}/units/${unitId}/logs`);
	// The page listens to the file input once its script runs.
	await page.waitForLoadState('networkidle');
	await page
		.locator('input[type=file]')
		.first()
		.setInputFiles({ name: 'known.csv', mimeType: 'text/csv', buffer: Buffer.from(known?.csv ?? '') });
	// From the page a log asks, so that a person sees the mapping once.
	await expect(async () => {
		const { logs } = await api<{ logs: { id: string; state: string }[] }>(page, `/api/units/${unitId}/logs`);
		expect(['needs-mapping', 'ready']).toContain(logs[0]?.state);
	}).toPass({ timeout: 30_000 });
	const { logs } = await api<{ logs: { id: string; state: string }[] }>(page, `/api/units/${unitId}/logs`);
	const log = logs[0];
	if (log?.state === 'needs-mapping') {
		await page.goto(`${origin()}/units/${unitId}/logs/${log.id}`);
		await page.getByRole('button', { name: /find starts/i }).click();
	}
	await expect(async () => {
		const { starts } = await api<{ starts: unknown[] }>(page, `/api/units/${unitId}/starts`);
		expect(starts).toHaveLength(known?.expect.length ?? -1);
	}).toPass({ timeout: 30_000 });
	const { starts } = await api<{ starts: { id: string; outcome: string }[] }>(page, `/api/units/${unitId}/starts`);
	const tripped = starts.find((start) => start.outcome === 'tripped');
	await page.goto(`${origin()}/units/${unitId}/starts/${tripped?.id}`);
	await expect(page.getByRole('heading', { level: 1 })).toContainText(/tripped/i);
	expect(errors).toEqual([]);
	await owner.context.close();
	await context.close();
});

test('the main job goes with the keyboard alone', async ({ browser }) => {
	const { context, page } = await signedIn(browser, 'technician');
	const { unit } = await worst(page);
	const focusOn = async (pattern: RegExp): Promise<void> => {
		for (let i = 0; i < 80; i++) {
			await page.keyboard.press('Tab');
			const name = await page.evaluate(() => document.activeElement?.textContent?.trim() ?? '');
			const label = await page.evaluate(() => document.activeElement?.getAttribute('aria-label') ?? '');
			if (pattern.test(name) || pattern.test(label)) return;
		}
		throw new Error(`Tab never reached ${pattern}`);
	};
	await focusOn(new RegExp(unit.tag));
	await page.keyboard.press('Enter');
	await page.waitForURL(/\/units\//);
	const focused = (attribute: string) =>
		page.evaluate((name) => document.activeElement?.getAttribute(name) ?? null, attribute);
	for (let i = 0; i < 40 && (await focused('data-start')) === null; i++) await page.keyboard.press('Tab');
	for (let i = 0; i < 60 && !/tripped/.test((await focused('aria-label')) ?? ''); i++)
		await page.keyboard.press('ArrowRight');
	expect(await focused('aria-label')).toMatch(/tripped/);
	await page.keyboard.press('Enter');
	await page.waitForURL(/\/starts\//);
	await expect(page.getByRole('heading', { level: 1 })).toContainText(/tripped/i);
	await context.close();
});
