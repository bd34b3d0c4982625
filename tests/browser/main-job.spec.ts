import { expect, test, type Page } from '@playwright/test';
import { knownCases } from '../../fixtures/known/index';
import { origin } from './support/product';
import { api, signedIn, worst } from './support/walk';

/** The whole path: upload, confirm the mapping, open the tripped start, read its figures, compare with a held one. */

type Traces = { traces: { signal: string; t: number[]; v: (number | null)[] }[] };

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

test('the cursor reads the stored samples, and the strips’ edges agree within a pixel', async ({ browser }) => {
	const { context, page, errors } = await signedIn(browser, 'engineer');
	const { unit, start } = await worst(page);
	await page.goto(`${origin()}/units/${unit.id}/starts/${start}`);
	await page.locator('[data-strip]').first().waitFor();
	await page.waitForLoadState('networkidle');
	const edges = await page.locator('[data-strip]').evaluateAll((strips) =>
		strips.map((strip) => {
			const box = strip.getBoundingClientRect();
			return [box.left, box.right];
		})
	);
	expect(edges.length).toBeGreaterThan(4);
	for (const [left, right] of edges) {
		expect(Math.abs((left ?? 0) - (edges[0]?.[0] ?? 0))).toBeLessThanOrEqual(1);
		expect(Math.abs((right ?? 0) - (edges[0]?.[1] ?? 0))).toBeLessThanOrEqual(1);
	}
	const traces = await api<Traces>(page, `/api/starts/${start}/traces?px=20000&before=60&after=2400`);
	const stored = new Map(traces.traces.map((trace) => [trace.signal, new Map(trace.t.map((t, i) => [t, trace.v[i]]))]));
	const box = await page.locator('[data-strip]').first().boundingBox();
	let compared = 0;
	for (const share of [0.2, 0.3, 0.42, 0.55, 0.8]) {
		await page.mouse.move((box?.x ?? 0) + (box?.width ?? 0) * share, (box?.y ?? 0) + 20);
		await page.waitForTimeout(60);
		const read = await page
			.locator('[data-readout][data-value]')
			.evaluateAll((lines) =>
				lines.map((line) => ({
					key: line.getAttribute('data-readout') ?? '',
					value: Number(line.getAttribute('data-value')),
					at: Number(line.getAttribute('data-sample-at'))
				}))
			);
		for (const { key, value, at } of read) {
			const sample = stored.get(key)?.get(at);
			if (sample === undefined || sample === null) continue;
			expect(Math.abs(sample - value), `${key} at ${at}`).toBeLessThan(0.01);
			compared++;
		}
	}
	expect(compared).toBeGreaterThan(25);
	expect(errors).toEqual([]);
	await context.close();
});

test('a link restores start, zoom, cursor and ghost', async ({ browser }) => {
	const { context, page } = await signedIn(browser, 'engineer');
	const { unit, start } = await worst(page);
	await page.goto(`${origin()}/units/${unit.id}/starts/${start}`);
	await page.locator('[data-strip]').first().waitFor();
	await page.waitForLoadState('networkidle');
	const box = await page.locator('[data-strip]').first().boundingBox();
	await page.mouse.move((box?.x ?? 0) + (box?.width ?? 0) * 0.4, (box?.y ?? 0) + 30);
	await page.keyboard.press('+');
	await page.keyboard.press('ArrowRight');
	await page.waitForTimeout(600);
	const state = () => page.locator('[data-cursor-at]').first().getAttribute('data-cursor-at');
	const before = await state();
	const link = page.url();
	expect(link).toContain('?');
	await page.goto('about:blank');
	await page.goto(link);
	await page.locator('[data-strip]').first().waitFor();
	await page.waitForLoadState('networkidle');
	expect(await state()).toBe(before);
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
	await focusOn(/tripped/i);
	await page.keyboard.press('Enter');
	await page.waitForURL(/\/starts\//);
	await expect(page.getByRole('heading', { level: 1 })).toContainText(/tripped/i);
	await context.close();
});
