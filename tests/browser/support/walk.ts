import AxeBuilder from '@axe-core/playwright';
import { expect, type Browser, type BrowserContext, type Page } from '@playwright/test';
import { FIXED_NOW, origin, PASSWORD } from './product';

export type Paper = 'day' | 'night';
export type Person = 'owner' | 'manager' | 'engineer' | 'technician' | 'client';
export const WIDTHS = { desk: { width: 1440, height: 1000 }, phone: { width: 360, height: 740 } } as const;

/** Signs a member of the demo in on a page, as a person does. */
export async function enter(page: Page, person: Person): Promise<void> {
	await page.goto(`${origin()}/sign-in`);
	await page.getByLabel(/mail/i).fill(`${person}@firstpull.test`);
	await page.getByLabel(/password/i).fill(PASSWORD);
	await page.getByRole('button', { name: /sign in/i }).click();
	await page.waitForURL((url) => url.pathname === '/');
}

/** A signed-in context whose pages fail the test on a console error, with the clock where the product's own stands. */
export async function signedIn(
	browser: Browser,
	person: Person,
	size: keyof typeof WIDTHS = 'desk',
	paper: Paper = 'day'
): Promise<{ context: BrowserContext; page: Page; errors: string[] }> {
	const context = await browser.newContext({
		viewport: WIDTHS[size],
		colorScheme: paper === 'night' ? 'dark' : 'light',
		hasTouch: size === 'phone',
		reducedMotion: 'reduce'
	});
	const page = await context.newPage();
	const errors: string[] = [];
	page.on('console', (message) => {
		if (message.type() === 'error') errors.push(message.text());
	});
	page.on('pageerror', (error) => errors.push(error.message));
	await page.clock.setFixedTime(new Date(FIXED_NOW));
	await enter(page, person);
	return { context, page, errors };
}

/** Changes the paper under a page as the system would: it follows at once, so a page is loaded once for both. */
export async function inPaper(page: Page, paper: Paper): Promise<void> {
	await page.emulateMedia({ colorScheme: paper === 'night' ? 'dark' : 'light', reducedMotion: 'reduce' });
	// Colours on their way from one paper to the other are neither's: the longest motion is 120 ms.
	await page.waitForTimeout(300);
}

/** What a change of paper can break: the colours. The rest of a page is the same in both. */
const OF_COLOUR = ['color-contrast', 'link-in-text-block'];

/** axe finds nothing wrong with the page (on a second paper: with its colours), and it is no wider than the window. */
export async function expectSound(page: Page, name: string, only: 'all' | 'colours' = 'all'): Promise<void> {
	const axe = new AxeBuilder({ page }).options({ resultTypes: ['violations'] });
	const { violations } = await (only === 'all' ? axe : axe.withRules(OF_COLOUR)).analyze();
	expect
		.soft(
			violations.map((violation) => `${violation.id}: ${violation.nodes[0]?.target.join(' ')}`),
			name
		)
		.toEqual([]);
	const overflow = await page.evaluate(
		() => document.documentElement.scrollWidth - document.documentElement.clientWidth
	);
	expect.soft(overflow, `${name} scrolls sideways`).toBeLessThanOrEqual(0);
}

/** JSON of the API, asked by the page's own session. */
export async function api<T>(page: Page, path: string): Promise<T> {
	const answer = await page.request.get(`${origin()}${path}`);
	expect(answer.status(), path).toBe(200);
	return (await answer.json()) as T;
}

export type Summary = {
	unit: { id: string; tag: string };
	starts: number;
	startupTrips: number;
	verdict: string | null;
	leading: { key: string } | null;
};

/** The unit that leads the list, and its newest tripped start. */
export async function worst(page: Page): Promise<{ unit: Summary['unit']; start: string }> {
	const { units } = await api<{ units: Summary[] }>(page, '/api/units?view=summary');
	const unit = units[0]?.unit ?? { id: '', tag: '' };
	const { starts } = await api<{ starts: { id: string }[] }>(page, `/api/units/${unit.id}/starts?outcome=tripped`);
	return { unit, start: starts.at(-1)?.id ?? '' };
}

/** Sum of the layout shifts since the page was opened (Layout Instability, W3C draft; no shift after an input counts). */
export async function shiftOf(page: Page): Promise<number> {
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
