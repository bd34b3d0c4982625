import { expect, test } from '@playwright/test';
import { origin } from './support/product';
import { api, signedIn, type Summary } from './support/walk';

/** What a person writes on a start: a note pinned to an instant, and a correction that outlives recomputation. */

type Sheet = { start: { id: string; outcome: string; attended: boolean; corrected: { reason: string } | null } };

test('a note is pinned at the cursor, and a start is corrected with a reason', async ({ browser }) => {
	const { context, page, errors } = await signedIn(browser, 'engineer', 'phone');
	const { units } = await api<{ units: Summary[] }>(page, '/api/units?view=summary');
	// The last of the list is a sound unit that no other test reads.
	const unit = units.filter(({ verdict }) => verdict === 'no-fault-pattern').at(-1)?.unit;
	const { starts } = await api<{ starts: { id: string; outcome: string }[] }>(page, `/api/units/${unit?.id}/starts`);
	const start = starts.findLast(({ outcome }) => outcome === 'held')?.id;
	const path = `/units/${unit?.id}/starts/${start}`;
	await page.goto(`${origin()}${path}`);
	await page.waitForLoadState('networkidle');

	await page.getByLabel(/pin a note at/i).fill('Fan two came on late');
	await page.getByRole('button', { name: 'Pin it' }).click();
	await expect(page.locator('.notes li').first()).toContainText('Fan two came on late');
	await page.reload();
	await expect(page.locator('.notes li').first()).toContainText('Fan two came on late');
	await expect(page.locator('[data-mark=note]').first()).toBeAttached();

	await page.getByText('Correct this start').click();
	await page.getByLabel(/attended/i).check();
	await page.getByRole('button', { name: 'Correct it' }).click();
	// Without a reason nothing is corrected, and what was set stays set.
	await expect(page.getByRole('alert')).toBeVisible();
	await expect(page.getByLabel(/attended/i)).toBeChecked();
	await page.getByLabel('Reason').fill('We stood beside it');
	await page.getByRole('button', { name: 'Correct it' }).click();
	await expect(page.getByText(/corrected; the unit was computed again/i)).toBeVisible({ timeout: 30_000 });
	const sheet = await api<Sheet>(page, `/api/starts/${start}`);
	expect(sheet.start.attended).toBe(true);
	expect(sheet.start.corrected?.reason).toBe('We stood beside it');
	expect(errors).toEqual([]);
	await context.close();
});
