import { expect, test, type BrowserContext, type Page } from '@playwright/test';
import sharp from 'sharp';
import { origin } from './support/product';
import { api, enter, signedIn, worst } from './support/walk';

/** A technician in a plant room without a connection, at 360 px: what is recorded there arrives once, whatever happens. */
const SMALL = { width: 360, height: 640 };
const NOTES = ['Sight glass clear at rest', 'Strainer was dirty', 'Isolating valve stiff'];

type Kept = { checks: { readings: { text?: string }; photos: unknown[] }[] };

/** An invented picture, another one each time. */
const picture = (i: number): Promise<Buffer> =>
	sharp({ create: { width: 640, height: 480, channels: 3, background: { r: 60 * i, g: 120, b: 90 } } })
		.jpeg()
		.toBuffer();

/** The page's service worker has taken over, and has seen this page and what it asks for. */
async function seen(page: Page): Promise<void> {
	await page.evaluate(async () => {
		await navigator.serviceWorker.ready;
	});
	await page.reload({ waitUntil: 'networkidle' });
	await expect.poll(() => page.evaluate(() => navigator.serviceWorker.controller !== null)).toBe(true);
	await page.reload({ waitUntil: 'networkidle' });
}

async function record(page: Page, text: string, photo: Buffer): Promise<void> {
	await page.getByRole('button', { name: 'Note', exact: true }).click();
	await page.locator('#record').getByLabel('Note', { exact: true }).first().fill(text);
	const picker = page.locator('input[type=file][multiple]');
	await picker.setInputFiles({ name: `${text}.jpg`, mimeType: 'image/jpeg', buffer: photo });
	await page.getByLabel('Caption').fill(`Photo of: ${text}`);
	await page.getByRole('button', { name: 'Keep', exact: true }).click();
	await expect(page.locator('#record').getByRole('status')).toContainText('Kept');
	await page.getByRole('button', { name: 'Close', exact: true }).click();
}

async function arrived(page: Page, unitId: string): Promise<string[]> {
	const { checks } = await api<Kept>(page, `/api/units/${unitId}/checks`);
	return checks
		.filter(({ readings }) => NOTES.includes(readings.text ?? ''))
		.map(({ readings, photos }) => `${readings.text}, ${photos.length}`)
		.sort();
}

const connect = (context: BrowserContext, on: boolean): Promise<void> => context.setOffline(!on);

test('three checks with photos, kept without a connection, a reload and a closed page later, arrive once each', async ({
	browser
}) => {
	test.setTimeout(180_000);
	const { context, page } = await signedIn(browser, 'technician', 'phone');
	await page.setViewportSize(SMALL);
	const { unit } = await worst(page);
	const address = `${origin()}/units/${unit.id}/checks`;
	await page.goto(address);
	await seen(page);
	expect(await arrived(page, unit.id)).toEqual([]);

	await connect(context, false);
	await page.reload();
	await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
	await expect(page.getByText('Offline', { exact: true })).toBeVisible();
	for (const [i, note] of NOTES.entries()) await record(page, note, await picture(i));
	const waiting = (of: Page) => of.getByRole('region', { name: 'Kept here, not sent yet' });
	await expect(waiting(page).getByRole('article')).toHaveCount(3);
	await expect(waiting(page)).toContainText('3 records');

	await page.reload();
	await expect(waiting(page).getByRole('article')).toHaveCount(3);
	await page.close();
	const again = await context.newPage();
	await again.setViewportSize(SMALL);
	await again.goto(address);
	await expect(waiting(again).getByRole('article')).toHaveCount(3);

	await connect(context, true);
	await expect(waiting(again)).toHaveCount(0, { timeout: 60_000 });
	const once = NOTES.map((note) => `${note}, 1`).sort();
	expect(await arrived(again, unit.id)).toEqual(once);
	for (const note of NOTES) await expect(again.getByText(note).first()).toBeVisible();

	await again.reload({ waitUntil: 'networkidle' });
	expect(await arrived(again, unit.id)).toEqual(once);
	await context.close();
});

test('what one person kept here waits for them, and is neither shown nor sent as another’s', async ({ browser }) => {
	test.setTimeout(120_000);
	const { context, page } = await signedIn(browser, 'technician', 'phone');
	const { unit } = await worst(page);
	const address = `${origin()}/units/${unit.id}/checks`;
	const text = 'Kept by the technician alone';
	const count = async (): Promise<number> => {
		const { checks } = await api<Kept>(page, `/api/units/${unit.id}/checks`);
		return checks.filter(({ readings }) => readings.text === text).length;
	};
	await page.goto(address);
	await seen(page);
	await connect(context, false);
	await record(page, text, await picture(1));
	// The connection comes back too thin for anything to be sent.
	const isRecord = (url: URL): boolean => /\/api\/units\/[^/]+\/(checks|photos)$/.test(url.pathname);
	await context.route(isRecord, (route) => (route.request().method() === 'POST' ? route.abort() : route.continue()));
	await connect(context, true);
	await page.goto(`${origin()}/account`);
	await page.getByRole('button', { name: 'Sign out everywhere' }).click();
	await page.waitForURL(/sign-in/);
	expect(await page.evaluate(async () => (await (await caches.open('seen')).keys()).length)).toBe(0);

	await context.unroute(isRecord);
	await enter(page, 'engineer');
	await page.goto(address, { waitUntil: 'networkidle' });
	await expect(page.getByRole('region', { name: 'Kept here, not sent yet' })).toHaveCount(0);
	expect(await count()).toBe(0);
	await page.goto(`${origin()}/account`);
	await page.getByRole('button', { name: 'Sign out everywhere' }).click();
	await page.waitForURL(/sign-in/);
	await enter(page, 'technician');
	await expect.poll(count, { timeout: 30_000 }).toBe(1);
	await context.close();
});
