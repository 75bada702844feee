import AxeBuilder from '@axe-core/playwright';
import { expect, test, type Page } from '@playwright/test';

const PASSWORD = 'paper ink amber 2026';

async function expectAccessible(page: Page): Promise<void> {
	const { violations } = await new AxeBuilder({ page })
		.withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa'])
		.analyze();
	expect(
		violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target.join(' ')).join(', ')}`)
	).toEqual([]);
}

async function fillIn(page: Page, email: string, password: string): Promise<void> {
	await page.getByLabel('E-mail address').fill(email);
	await page.getByLabel('Password').fill(password);
	await page.getByRole('button', { name: 'Sign in' }).click();
}

test('somebody who is signed out comes to sign-in and then to the page that was asked for', async ({
	page
}) => {
	await page.goto('/operations');
	await expect(page).toHaveURL(/\/sign-in\?next=/);
	await expect(page.getByText('Sign in to go on to the page you asked for.')).toBeVisible();
	await expectAccessible(page);
	await fillIn(page, 'admin@example.org', PASSWORD);
	await expect(page.getByRole('heading', { level: 1, name: 'Operations' })).toBeVisible();
});

test.describe('a wrong password', () => {
	for (const javaScriptEnabled of [true, false]) {
		test.describe(javaScriptEnabled ? 'with scripts' : 'without scripts', () => {
			test.use({ javaScriptEnabled });
			test('says so, keeps the address and forgets the password', async ({ page }) => {
				await page.goto('/sign-in');
				if (javaScriptEnabled) await page.waitForLoadState('networkidle');
				await fillIn(page, 'admin@example.org', 'not the right words');
				await expect(page.getByRole('alert')).toContainText('do not belong together');
				await expect(page.getByLabel('E-mail address')).toHaveValue('admin@example.org');
				await expect(page.getByLabel('Password')).toHaveValue('');
				await fillIn(page, 'admin@example.org', PASSWORD);
				await expect(page.getByRole('heading', { level: 1, name: 'People' })).toBeVisible();
			});
		});
	}
});

test('signing out by the keyboard ends the session', async ({ page }) => {
	await page.goto('/sign-in');
	await page.waitForLoadState('networkidle');
	await page.getByLabel('E-mail address').fill('admin@example.org');
	await page.getByLabel('Password').fill(PASSWORD);
	await page.keyboard.press('Enter');
	await expect(page.getByRole('heading', { level: 1, name: 'People' })).toBeVisible();
	await page.locator('header summary').first().focus();
	await page.keyboard.press('Enter');
	await page.getByRole('button', { name: 'Sign out' }).press('Enter');
	await expect(page).toHaveURL(/\/sign-in/);
	await page.goto('/people');
	await expect(page).toHaveURL(/\/sign-in\?next=/);
});

test('the account page offers a second factor with a QR code', async ({ page }) => {
	await page.goto('/sign-in');
	await page.waitForLoadState('networkidle');
	await fillIn(page, 'desk.mill@example.org', PASSWORD);
	await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
	await page.goto('/account');
	await expectAccessible(page);
	await page.waitForLoadState('networkidle');
	await page.getByRole('button', { name: 'Set up a second factor' }).click();
	await expect(page.getByAltText(/QR code/)).toBeVisible();
	await page.getByLabel('Code').fill('000000');
	await page.getByRole('button', { name: 'Switch on' }).click();
	await expect(page.getByText('This code does not fit.')).toBeVisible();
	await expect(page.getByAltText(/QR code/)).toBeVisible();
	await expectAccessible(page);
});
