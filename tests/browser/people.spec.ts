import { expect, test } from '@playwright/test';
import { Secret, TOTP } from 'otpauth';
import { letterTo } from './support/post';
import { FIXED_NOW, origin } from './support/product';
import { expectSound, signedIn, type Summary } from './support/walk';

// Invented people throughout.
const NEWCOMER = 'newcomer@firstpull.test';
const CHOSEN = 'a long one, chosen here';

test('an owner invites somebody by mail, who joins, adds a second step, and is out when the owner ends it', async ({
	browser
}) => {
	test.setTimeout(180_000);
	const owner = await signedIn(browser, 'owner');
	await owner.page.goto(`${origin()}/office`);
	await owner.page.getByRole('button', { name: 'Invite somebody' }).click();
	await owner.page.getByRole('button', { name: 'Send the invitation' }).click();
	await expect(owner.page.getByText('This is no e-mail address.')).toBeVisible();
	await owner.page.getByLabel('E-mail').fill(NEWCOMER);
	await owner.page.getByLabel('Name', { exact: true }).fill('Newcomer');
	await expectSound(owner.page, 'invitation form');
	await owner.page.getByRole('button', { name: 'Send the invitation' }).click();
	await expect(owner.page.getByText(`The invitation is on its way to ${NEWCOMER}`)).toBeVisible();
	const letter = await letterTo(NEWCOMER, /invitation\?token=/);
	const link = /\/invitation\?token=[\w-]+/.exec(letter)?.[0] ?? '';

	const context = await browser.newContext({ viewport: { width: 360, height: 640 } });
	const page = await context.newPage();
	await page.goto(origin() + link);
	await expectSound(page, 'invitation');
	await page.getByLabel('Password').fill('short');
	await page.getByRole('button', { name: 'Join' }).click();
	await expect(page.getByText('12 characters at least.')).toBeVisible();
	await expect(page.getByLabel('Your name')).toHaveValue('Newcomer');
	await page.getByLabel('Password').fill(CHOSEN);
	await page.getByRole('button', { name: 'Join' }).click();
	await expect(page.getByText('You are a member now. Sign in.')).toBeVisible();
	const signIn = async (code?: string): Promise<void> => {
		await page.getByLabel(/mail/i).fill(NEWCOMER);
		await page.getByLabel(/password/i).fill(CHOSEN);
		if (code) await page.getByLabel('Code of your authenticator').fill(code);
		await page.getByRole('button', { name: 'Sign in', exact: true }).click();
	};
	await signIn();
	await page.waitForURL((url) => url.pathname === '/');

	await page.goto(`${origin()}/account`);
	const twoStep = page.getByRole('region', { name: 'Two-step sign-in' });
	await twoStep.getByLabel('Your password').fill(CHOSEN);
	await twoStep.getByRole('button', { name: 'Set it up' }).click();
	const secret = ((await twoStep.locator('code').first().textContent()) ?? '').replaceAll(/\s/g, '');
	const totp = new TOTP({ secret: Secret.fromBase32(secret), digits: 6, period: 30 });
	await expectSound(page, 'two-step set-up');
	await twoStep.getByLabel('The code it shows now').fill(totp.generate({ timestamp: Date.parse(FIXED_NOW) }));
	await twoStep.getByRole('button', { name: 'Turn it on' }).click();
	const codes = twoStep.getByRole('listitem');
	await expect(codes).toHaveCount(10);
	const recovery = (await codes.first().textContent())?.trim() ?? '';
	await page.getByRole('button', { name: 'Sign out everywhere' }).click();
	await page.waitForURL(/sign-in/);
	await signIn();
	await expect(page.getByText('Give the code of your authenticator')).toBeVisible();
	await signIn(recovery);
	await page.waitForURL((url) => url.pathname === '/');

	await owner.page.reload();
	const line = owner.page.getByRole('listitem').filter({ hasText: NEWCOMER });
	await line.getByRole('button', { name: 'End', exact: true }).click();
	await line.getByRole('button', { name: 'End the membership' }).click();
	await expect(owner.page.getByRole('region', { name: 'Have left' })).toContainText('Newcomer');
	await page.goto(`${origin()}/account`);
	await page.waitForURL(/sign-in/);
	expect(owner.errors.filter((text) => !/422/.test(text))).toEqual([]);
	await context.close();
	await owner.context.close();
});

test('a forgotten password is chosen anew by a link in the mail', async ({ browser }) => {
	const context = await browser.newContext();
	const page = await context.newPage();
	await page.goto(`${origin()}/sign-in`);
	await page.getByRole('link', { name: 'Forgot the password' }).click();
	await page.waitForURL(/\/reset$/);
	await page.getByLabel('E-mail').fill('nobody@firstpull.test');
	await page.getByRole('button', { name: 'Send me a link' }).click();
	const said = page.getByText('If this address is known here, a link is on its way.');
	await expect(said).toBeVisible();
	await page.goto(`${origin()}/reset`);
	await page.getByLabel('E-mail').fill('client@firstpull.test');
	await page.getByRole('button', { name: 'Send me a link' }).click();
	await expect(said).toBeVisible();
	const letter = await letterTo('client@firstpull.test', /reset\?token=/);
	await page.goto(`${origin()}${/\/reset\?token=[\w-]+/.exec(letter)?.[0] ?? ''}`);
	await expectSound(page, 'reset');
	// The demo's own password again, so that other walks still sign in.
	await page.getByLabel('New password').fill('cold-start-0600');
	await page.getByRole('button', { name: 'Keep it' }).click();
	await expect(page.getByText('Your new password is kept.')).toBeVisible();
	await page.goBack();
	await page.reload();
	await expect(page.getByText('This link has expired or was used.')).toBeVisible();
	await context.close();
});

test('the local identity provider signs its member in', async ({ browser }) => {
	const context = await browser.newContext();
	const page = await context.newPage();
	await page.goto(`${origin()}/sign-in?next=%2Fcases`);
	await page.getByRole('link', { name: 'Sign in through your identity provider' }).click();
	await page.waitForURL(`${origin()}/cases`);
	await expect(page.getByText('service engineer').first()).toBeVisible();
	await context.close();
});

test('forms from elsewhere are refused; one click of a mail program and a program’s multipart log are not', async ({
	browser,
	playwright
}) => {
	const { context, page } = await signedIn(browser, 'owner');
	const elsewhere = { origin: 'https://elsewhere.test' };
	const others: Record<string, string>[] = [elsewhere, { origin: 'null' }, {}];
	for (const headers of others)
		for (const path of ['/sign-out', '/account/address', '/api/me', '/api/office'])
			expect(
				(await page.request.post(`${origin()}${path}`, { form: { everywhere: 'yes' }, headers })).status(),
				`${path} from ${headers['origin'] ?? 'nowhere'}`
			).toBe(403);
	expect((await page.request.get(`${origin()}/api/me`)).status()).toBe(200);

	const bare = await playwright.request.newContext();
	const login = { form: { email: 'owner@firstpull.test', password: 'cold-start-0600' }, headers: elsewhere };
	expect((await bare.post(`${origin()}/sign-in`, login)).status()).toBe(403);
	const click = await bare.post(`${origin()}/unsubscribe?token=unknown`, { form: { 'List-Unsubscribe': 'One-Click' } });
	expect(click.status()).toBe(200);

	const made = await page.request.post(`${origin()}/api/keys`, {
		data: { name: 'multipart', scopes: ['logs'] },
		headers: { origin: origin() }
	});
	const { key } = (await made.json()) as { key: string };
	const { units } = (await (await page.request.get(`${origin()}/api/units?view=summary`)).json()) as {
		units: Summary[];
	};
	const png = { name: 'x.png', mimeType: 'image/png', buffer: Buffer.from('89504e470d0a1a0a00000000', 'hex') };
	const refused = await bare.post(`${origin()}/api/units/${units[0]?.unit.id}/logs`, {
		multipart: { file: png },
		headers: { authorization: `Bearer ${key}` }
	});
	// Read and found to be no log, not refused for where it came from.
	expect(refused.status()).toBe(415);
	await bare.dispose();
	await context.close();
});

test('everything is found from the keyboard', async ({ browser }) => {
	const { context, page, errors } = await signedIn(browser, 'engineer');
	const { cases } = (await (await page.request.get(`${origin()}/api/cases`)).json()) as {
		cases: { id: string; number: string; unitTag: string }[];
	};
	const wanted = cases[0];
	await page.keyboard.press('/');
	await page.keyboard.type(wanted?.number ?? '');
	const options = page.getByRole('option');
	await expect(options.filter({ hasText: 'case' }).first()).toBeVisible();
	const texts = await options.allTextContents();
	const at = texts.findIndex((text) => text.includes(`${wanted?.number}, `));
	for (let i = 0; i < at; i++) await page.keyboard.press('ArrowDown');
	await page.keyboard.press('Enter');
	await page.waitForURL(`${origin()}/cases/${wanted?.id}`);
	await page.keyboard.press('/');
	await page.keyboard.type('nothing has all of these');
	await expect(page.getByText('Nothing has every one of these words.')).toBeVisible();
	expect(errors).toEqual([]);
	await context.close();
});
