import { expect, test } from '@playwright/test';
import { expectSound, inPaper, shiftOf, signedIn, worst, type Paper, type WIDTHS } from './support/walk';

/** Every page, in both papers and both widths: axe, no console error, no sideways scrolling, nothing that moves. */
const SIZES: (keyof typeof WIDTHS)[] = ['desk', 'phone'];
const PAPERS: Paper[] = ['day', 'night'];

for (const size of SIZES)
	test(`every page is sound at the ${size} in both papers`, async ({ browser }) => {
		test.setTimeout(480_000);
		const { context, page, errors } = await signedIn(browser, 'owner', size);
		const { unit, start } = await worst(page);
		const below = `/units/${unit.id}`;
		const pages = [
			'/',
			below,
			`${below}/starts`,
			`${below}/starts/${start}`,
			`${below}/nights`,
			`${below}/season`,
			`${below}/side-by-side`,
			`${below}/suspects`,
			`${below}/checks`,
			`${below}/logs`,
			`${below}/logs/record`,
			'/cases',
			'/visits',
			'/office',
			'/office/plant',
			'/office/keys',
			'/office/mail',
			'/office/jobs',
			'/office/audit',
			'/office/settings',
			'/method',
			'/account'
		];
		for (const path of pages) {
			const answer = await page.goto(new URL(path, page.url()).href);
			expect(answer?.status(), path).toBe(200);
			await page.waitForLoadState('networkidle');
			await expect(page.getByRole('heading', { level: 1 }), path).toBeVisible();
			expect.soft(await shiftOf(page), `${path} moves while it fills`).toBeLessThanOrEqual(0.02);
			for (const paper of PAPERS) {
				await inPaper(page, paper);
				await test.step(`${path} ${paper}`, () =>
					expectSound(page, `${path} ${paper}`, paper === 'day' ? 'all' : 'colours'));
			}
			expect(errors, path).toEqual([]);
		}
		await context.close();
	});

test('the sign-in page is sound', async ({ browser }) => {
	const context = await browser.newContext();
	const page = await context.newPage();
	await page.goto(`${process.env.FIRSTPULL_ORIGIN}/sign-in`);
	await expectSound(page, '/sign-in');
	await context.close();
});
