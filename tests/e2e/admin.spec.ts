import AxeBuilder from '@axe-core/playwright';
import { expect, test, type Page } from '@playwright/test';

const PASSWORD = 'paper ink amber 2026';

test.beforeEach(async ({ page }) => {
	await page.goto('/sign-in');
	await page.waitForLoadState('networkidle');
	await page.getByLabel('E-mail address').fill('admin@example.org');
	await page.getByLabel('Password').fill(PASSWORD);
	await page.getByRole('button', { name: 'Sign in' }).click();
	await expect(page.getByRole('heading', { level: 1, name: 'People' })).toBeVisible();
});

async function open(page: Page, path: string): Promise<void> {
	await page.goto(path);
	await page.waitForLoadState('networkidle');
}

for (const [path, title] of [
	['/people', 'People'],
	['/sites', 'Sites and openings'],
	['/standard', 'Standard and policy'],
	['/operations', 'Operations'],
	['/access-record', 'Record of access']
] as const) {
	for (const scheme of ['light', 'dark'] as const) {
		test(`${title} is accessible and fits a telephone, ${scheme}`, async ({ page }) => {
			await page.emulateMedia({ colorScheme: scheme });
			await open(page, path);
			await expect(page.getByRole('heading', { level: 1, name: title })).toBeVisible();
			for (const width of [1280, 390]) {
				await page.setViewportSize({ width, height: 900 });
				const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
				expect(over).toBeLessThanOrEqual(0);
				const { violations } = await new AxeBuilder({ page })
					.withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa'])
					.analyze();
				expect(
					violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join(' ')}`)
				).toEqual([]);
			}
		});
	}
}

test('an invited person chooses a password and has the role; disabled, the person is out at once', async ({
	page,
	browser
}) => {
	await page.getByLabel('Name', { exact: true }).fill('Robin O’Test');
	await page.getByLabel('E-mail address').fill('robin.test@example.org');
	await page
		.locator('#invite')
		.getByRole('checkbox', { name: /^Front desk/ })
		.first()
		.check();
	await page.getByRole('button', { name: 'Make invitation link' }).click();
	const link = await page.getByTestId('invitation-link').textContent();
	await expect(page.getByRole('row', { name: /Robin O’Test/ })).toContainText('Invited');

	const other = await browser.newPage();
	await open(other, new URL(link ?? '').pathname);
	await other.getByLabel('New password').fill('four good new words');
	await other.getByLabel('The same again').fill('four good new words');
	await other.getByRole('button', { name: 'Set password and sign in' }).click();
	await expect(other).toHaveURL(/\/queue/);

	await open(page, '/people');
	const row = page.getByRole('row', { name: /Robin O’Test/ });
	await expect(row).toContainText('Active');
	await row.locator('summary').click();
	await row.getByRole('button', { name: 'Disable account' }).click();
	await expect(row).toContainText('Disabled');
	await other.goto('/queue');
	await expect(other).toHaveURL(/\/sign-in/);
	await other.close();
});

test('an opening is added, clashes are told beside the field, removing tells what stands', async ({
	page
}) => {
	await open(page, '/sites');
	await page
		.getByRole('row', { name: /Clinic/ })
		.first()
		.getByRole('link')
		.click();
	await page.waitForLoadState('networkidle');
	await page.getByLabel('Day', { exact: true }).first().selectOption('Sunday');
	await page.getByLabel('From').fill('20:00');
	await page.getByLabel('Until').fill('21:00');
	await page.getByLabel('Kind of visit').selectOption('Feeding help');
	await page.getByRole('button', { name: 'Add opening' }).click();
	await expect(page.getByText('The opening is added; its places can be booked now.')).toBeVisible();
	await page.getByRole('button', { name: 'Add opening' }).click();
	await expect(page.getByText(/This overlaps the opening/)).toBeVisible();
	await expect(page.getByLabel('From')).toHaveValue('20:00');
	await page.getByRole('button', { name: /Remove\s+Sunday 20:00/ }).click();
	await expect(page.getByText('The opening is removed. No visit was booked there.')).toBeVisible();
});

test('a policy out of reason is refused beside its field, a good one is kept and on record', async ({
	page
}) => {
	await open(page, '/standard');
	const climb = page.getByLabel('Before it climbs');
	const before = await climb.inputValue();
	await climb.fill('0');
	await page.getByRole('button', { name: /^Save policy/ }).click();
	await expect(page.locator('#climbMinutes-error')).toContainText('At least 5 minutes.');
	await climb.fill('25');
	await page.getByRole('button', { name: /^Save policy/ }).click();
	await expect(page.getByText('Saved. It holds for every due time set from now on.')).toBeVisible();
	await open(page, '/access-record');
	await expect(page.getByRole('row', { name: /changed a site’s policy/ }).first()).toContainText(
		'climbMinutes'
	);
	await open(page, '/standard');
	await climb.fill(before);
	await page.getByRole('button', { name: /^Save policy/ }).click();
	await expect(page.getByText('Saved. It holds for every due time set from now on.')).toBeVisible();
});

test('an administrator sees no newborn by that role', async ({ page }) => {
	for (const path of ['/queue', '/waiting', '/discharges', '/search?q=a']) {
		expect((await page.goto(path))?.status()).toBe(403);
	}
	await page.goto('/measures');
	await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
	await expect(page.getByRole('search')).toHaveCount(0);
});
