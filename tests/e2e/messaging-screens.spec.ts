import { AxeBuilder } from '@axe-core/playwright';
import { expect, test, type Page } from '@playwright/test';
import { DEMO_PASSWORD } from '../../jobs/demo/organisation';

async function signIn(page: Page, email: string): Promise<void> {
	await page.goto('/sign-in');
	await page.getByLabel('E-mail').fill(email);
	await page.getByLabel('Password').fill(DEMO_PASSWORD);
	await page.getByRole('button', { name: /sign in/i }).click();
	await expect(page).not.toHaveURL(/sign-in/, { timeout: 30_000 });
}

async function expectAccessible(page: Page): Promise<void> {
	const { violations } = await new AxeBuilder({ page }).analyze();
	expect(violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html ?? ''}`)).toEqual([]);
}

test('the thread with a family and the calendar addresses are accessible', async ({ page }) => {
	await signIn(page, 'desk@example.org');
	await page.goto('/queue');
	await page.getByRole('link', { name: /Novak/ }).first().click();
	await expect(page).toHaveURL(/\/queue\/[a-z0-9]{16}/);
	const followUpId = /queue\/([a-z0-9]{16})/.exec(page.url())?.[1] ?? '';
	await page.goto(`/follow-ups/${followUpId}/thread`);
	await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
	await expectAccessible(page);
	await page.goto('/account/feeds');
	await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
	await expectAccessible(page);
});

test('the wording and one of its texts are accessible', async ({ page }) => {
	await signIn(page, 'admin@example.org');
	await page.goto('/wording');
	await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
	await expectAccessible(page);
	await page.goto('/wording/visit-booked/sms/ar');
	await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
	await expectAccessible(page);
});
