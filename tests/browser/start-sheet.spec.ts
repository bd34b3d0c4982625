import { expect, test, type Page } from '@playwright/test';
import type { Start } from '../../src/lib/model/wire/start';
import type { Traces } from '../../src/lib/model/wire/views';
import { origin, PASSWORD } from './support/product';

/** The start sheet against the stored samples: every read-out, the strips' edges, and what the address restores. */

async function signIn(page: Page): Promise<void> {
	await page.goto(`${origin()}/sign-in`);
	await page.getByLabel('E-mail').fill('engineer@firstpull.test');
	await page.getByLabel('Password').fill(PASSWORD);
	await page.getByRole('button', { name: 'Sign in' }).click();
	await page.waitForURL(`${origin()}/`);
}

/** The first unit with a start-up trip, and that start. */
async function trippedStart(page: Page): Promise<{ unitId: string; start: Start }> {
	const { units } = (await (await page.request.get(`${origin()}/api/units?view=summary`)).json()) as {
		units: { unit: { id: string }; startupTrips: number }[];
	};
	const unitId = units.find(({ startupTrips }) => startupTrips > 0)?.unit.id ?? '';
	const answer = await page.request.get(`${origin()}/api/units/${unitId}/starts?outcome=tripped`);
	const { starts } = (await answer.json()) as { starts: Start[] };
	const start = starts.find(({ startupTrip }) => startupTrip);
	if (!start) throw new Error('the demo has no start-up trip');
	return { unitId, start };
}

async function open(page: Page): Promise<{ start: Start; traces: Traces }> {
	await signIn(page);
	const { unitId, start } = await trippedStart(page);
	await page.goto(`${origin()}/units/${unitId}/starts/${start.id}`);
	await page.locator('[data-trace][data-role="own"]').first().waitFor();
	const answer = await page.request.get(`${origin()}/api/starts/${start.id}/traces?before=120&after=2400&px=20000`);
	return { start, traces: (await answer.json()) as Traces };
}

type ReadOut = { key: string; value: number; at: number };

async function readOuts(page: Page): Promise<{ cursor: number; read: ReadOut[] }> {
	return page.evaluate(() => ({
		cursor: Number(document.querySelector('[data-cursor-at]')?.getAttribute('data-cursor-at')),
		read: [...document.querySelectorAll<HTMLElement>('[data-readout][data-value]')].map((element) => ({
			key: element.dataset.readout ?? '',
			value: Number(element.dataset.value),
			at: Number(element.dataset.sampleAt)
		}))
	}));
}

test('every read-out is a stored sample, wherever the cursor stands', async ({ page }) => {
	await page.setViewportSize({ width: 1440, height: 1000 });
	const { traces } = await open(page);
	const plot = await page.locator('[data-strip="low-side"]').boundingBox();
	if (!plot) throw new Error('no low side');
	for (const share of [0.05, 0.21, 0.33, 0.48, 0.62, 0.85]) {
		await page.mouse.move(plot.x + share * plot.width, plot.y + 40);
		const { cursor, read } = await readOuts(page);
		expect(read.length).toBeGreaterThan(5);
		for (const { key, value, at } of read) {
			const trace = traces.traces.find(({ signal }) => signal === key);
			const index = trace?.t.indexOf(at) ?? -1;
			expect(index, `${key} at ${at}`).toBeGreaterThanOrEqual(0);
			expect(value).toBeCloseTo(trace?.v[index] ?? Number.NaN, 3);
			if (trace?.logging === 'interval') expect(Math.abs(at - cursor)).toBeLessThanOrEqual(120_000);
		}
	}
});

test('the strips’ edges agree within a pixel', async ({ page }) => {
	for (const [width, height] of [
		[1440, 1000],
		[360, 740]
	] as const) {
		await page.setViewportSize({ width, height });
		await open(page);
		const edges = await page.locator('[data-strip]').evaluateAll((strips) =>
			strips.map((strip) => {
				const { left, right } = strip.getBoundingClientRect();
				return { left, right };
			})
		);
		expect(edges.length).toBeGreaterThan(6);
		for (const { left, right } of edges) {
			expect(Math.abs(left - (edges[0]?.left ?? 0))).toBeLessThan(1);
			expect(Math.abs(right - (edges[0]?.right ?? 0))).toBeLessThan(1);
		}
		await page.context().clearCookies();
	}
});

test('arrows move the cursor a sample, and a link restores what was on the screen', async ({ page }) => {
	await page.setViewportSize({ width: 1440, height: 1000 });
	await open(page);
	const before = await readOuts(page);
	await page.keyboard.press('ArrowRight');
	const after = await readOuts(page);
	expect(after.cursor).toBeGreaterThan(before.cursor);
	await page.keyboard.press('+');
	await page.keyboard.press('g');
	await page.waitForURL(/from=.*ghost=none/);
	const ticks = await page.locator('.tick').allTextContents();
	await page.goto(page.url());
	await page.locator('[data-trace][data-role="own"]').first().waitFor();
	expect((await readOuts(page)).cursor).toBe(after.cursor);
	expect(await page.locator('.tick').allTextContents()).toEqual(ticks);
	expect(await page.locator('[data-role="ghost"]').count()).toBe(0);
	await page.keyboard.press('Home');
	await expect(page.getByText(/slow paper, 1 : \d+/)).toBeVisible();
});
