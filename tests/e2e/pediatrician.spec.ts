import AxeBuilder from '@axe-core/playwright';
import { expect, test, type Locator, type Page } from '@playwright/test';
import { fillNewborn } from './fill-newborn';

/** Everybody of the demo has the same password; see the sign-ins that the start command prints. */
const PASSWORD = 'paper ink amber 2026';

async function signIn(page: Page, email: string): Promise<void> {
	await page.goto('/sign-in');
	await page.getByLabel('E-mail').fill(email);
	await page.getByLabel('Password').fill(PASSWORD);
	await page.getByRole('button', { name: 'Sign in' }).click();
	await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
	// The first page must have arrived, or the next address would cut off its loading.
	await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
	await page.waitForLoadState('load');
}

const asPediatrician = (page: Page) => signIn(page, 'pediatrician@example.org');

/** Scripts are running: before that, a form would be sent whole. */
async function scripted(page: Page): Promise<void> {
	await page.waitForLoadState('networkidle');
}

async function open(page: Page, familyName: string): Promise<void> {
	await page.goto('/waiting');
	await page.getByRole('link', { name: new RegExp(`^${familyName}`) }).click();
	await expect(page.getByRole('heading', { level: 1, name: new RegExp(`^${familyName}`) })).toBeVisible();
	await scripted(page);
}

async function expectAccessible(page: Page): Promise<void> {
	const { violations } = await new AxeBuilder({ page })
		.withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa'])
		.analyze();
	expect(
		violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target.join(' ')).join(', ')}`)
	).toEqual([]);
}

const stepsIn = (within: Page | Locator) =>
	within.getByRole('list', { name: 'Steps from the values to the result' }).getByRole('listitem');
const cautionsIn = (within: Page | Locator) =>
	within.getByRole('list', { name: 'Cautions' }).getByRole('listitem');
const part = (page: Page, name: string) => page.getByRole('region', { name, exact: true });

test('the list that waits puts a value over the line first, and opens by keyboard', async ({ page }) => {
	await asPediatrician(page);
	await page.goto('/waiting');
	const rows = page.getByRole('row');
	await expect(rows.nth(1)).toContainText(/mg\/dL over the (phototherapy|escalation|exchange) line/);
	await expect(rows.nth(1)).toContainText('Decide');
	await expect(page.getByText('does not replace clinical judgement')).toBeVisible();
	await expectAccessible(page);
	await scripted(page);
	await page.keyboard.press('j');
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL(/\/follow-ups\/[a-z0-9]+$/);
	const standard = part(page, 'By the standard, now');
	await expect(standard).toContainText('Serum bilirubin at or over the phototherapy line: phototherapy.');
	await expect(standard).toContainText(/mg\/dL over the phototherapy line/);
});

test('a value is held against the line while it is typed, refused in words, and nothing typed is lost', async ({
	page
}) => {
	await asPediatrician(page);
	await open(page, 'Yılmaz');
	const form = part(page, 'New value');
	await form.getByLabel('Total').fill('11.4');
	await form.getByLabel('Direct').fill('12');
	await form.getByRole('button', { name: 'Save the value' }).click();
	const summary = form.getByRole('alert');
	await expect(summary).toBeFocused();
	await expect(summary).toContainText('Choose how it was measured.');
	await expect(summary).toContainText('The direct part cannot be more than the total.');
	await expect(form.getByLabel('Total')).toHaveValue('11.4');
	await expectAccessible(page);

	await form.getByRole('radio', { name: 'TSB' }).check();
	await form.getByLabel('Direct').fill('0.4');
	await form.getByLabel('Weight').fill('3120');
	await form.getByRole('button', { name: 'Now', exact: true }).click();
	await expect(form.getByText('With this value, not saved yet:')).toBeVisible();
	await expect(form.getByText(/mg\/dL below the phototherapy line/)).toBeVisible();
	await form.getByRole('button', { name: 'Save the value' }).click();

	await expect(page.getByRole('status').filter({ hasText: 'The value is saved.' })).toBeVisible();
	await expect(page.getByText('Next step', { exact: true }).locator('..')).toContainText('Decide');
	await expect(part(page, 'Values').getByRole('row').nth(1)).toContainText('11.4 mg/dL');
	await expect(part(page, 'Treatment and weight')).toContainText('3,120 g');
});

test('a recommendation is accepted, and the next step goes to the front desk', async ({ page }) => {
	await asPediatrician(page);
	await open(page, 'Hernández');
	await expect(part(page, 'By the standard, now')).toContainText('Follow up in the window');
	await page.getByText('Why: each step of the rule').click();
	await expect(part(page, 'By the standard, now')).toContainText('AAP 2022');
	await expectAccessible(page);
	await page.keyboard.press('d');
	await expect(part(page, 'Decide').getByLabel('Note')).toBeFocused();
	await part(page, 'Decide').getByRole('button', { name: 'Accept this' }).click();
	await expect(page.getByRole('status').filter({ hasText: 'The decision is saved.' })).toBeVisible();
	await expect(page.getByText('Make the visit')).toBeVisible();
	await expect(part(page, 'Decisions')).toContainText('as the standard allows');
	await page.goto('/waiting');
	await expect(page.getByRole('link', { name: /^Hernández/ })).toHaveCount(0);
});

test('a value is struck with a reason and stays in sight; the follow-up closes against the standard with a reason', async ({
	page
}) => {
	await asPediatrician(page);
	await open(page, 'Lindgren');
	const values = part(page, 'Values');
	await values.locator('summary').first().click();
	const strike = values.getByRole('button', { name: 'Strike this value' }).first();
	await strike.click();
	await expect(values.getByText('Say why this value is struck.').first()).toBeVisible();
	await values.getByLabel('Why').first().fill('Sample of another newborn.');
	await strike.click();
	await expect(values.getByText('Sample of another newborn.')).toBeVisible();

	const decide = part(page, 'Decide');
	const otherwise = decide.getByText('Decide otherwise');
	if (await otherwise.isVisible()) await otherwise.click();
	await decide.getByRole('radio', { name: 'Close' }).check();
	await decide.getByRole('button', { name: 'Decide this' }).click();
	await expect(decide.getByText('Say why you decide otherwise.')).toBeVisible();
	await expect(decide.getByRole('radio', { name: 'Close' })).toBeChecked();
	await decide.getByLabel('Why').fill('Seen and well, falling by the skin value.');
	await decide.getByRole('button', { name: 'Decide this' }).click();
	await expect(page.getByText('Closed, nothing is owed')).toBeVisible();
	await expect(part(page, 'Decisions')).toContainText('Seen and well, falling by the skin value.');

	await part(page, 'Open again').getByLabel('Why it opens again').fill('Mother called: yellow again.');
	await part(page, 'Open again').getByRole('button', { name: 'Open again' }).click();
	await expect(page.getByText('Next step', { exact: true }).locator('..')).toContainText('Decide');
});

test('an alert is settled with what was done', async ({ page }) => {
	await asPediatrician(page);
	await open(page, 'Vesely');
	const alerts = part(page, 'Alerts');
	await alerts.getByRole('button', { name: 'Settle' }).click();
	await expect(alerts.getByText('Say what was done.')).toBeVisible();
	await alerts.getByLabel('What was done').fill('Referred to the liver team today.');
	await alerts.getByRole('button', { name: 'Settle' }).click();
	await expect(page.getByRole('status').filter({ hasText: 'The alert is settled.' })).toBeVisible();
	await alerts.getByText(/^Settled alerts/).click();
	await expect(alerts.getByText('Referred to the liver team today.')).toBeVisible();
});

test('the end of phototherapy is asked for while it runs', async ({ page }) => {
	await asPediatrician(page);
	await open(page, 'Sørensen');
	await part(page, 'End of phototherapy').getByRole('button', { name: 'Record the end' }).click();
	await expect(
		part(page, 'End of phototherapy').getByText('Type the time, such as 14:20.').first()
	).toBeVisible();
});

test('the summary for the record prints the hand-over without the frame around it', async ({ page }) => {
	await asPediatrician(page);
	await open(page, 'Sørensen');
	await page.getByText('Why: each step of the rule').click();
	const standard = part(page, 'By the standard, now');
	await expect(stepsIn(standard).first()).toBeVisible();
	const reasons = await stepsIn(standard).allInnerTexts();
	const cautions = await cautionsIn(standard).allInnerTexts();
	expect(reasons.length).toBeGreaterThan(3);
	expect(cautions.length).toBeGreaterThan(0);
	await page.getByRole('link', { name: 'Summary for the record' }).click();
	await expect(page.getByRole('heading', { level: 1, name: /^Sørensen/ })).toBeVisible();
	for (const words of [
		'Antiglobulin test',
		'Discharge weight',
		'Phototherapy',
		'Rule that decides',
		'Responsible'
	]) {
		await expect(page.getByText(words, { exact: true }).first()).toBeVisible();
	}
	expect(await stepsIn(page).allInnerTexts()).toEqual(reasons);
	expect(await cautionsIn(page).allInnerTexts()).toEqual(cautions);
	await expectAccessible(page);
	await page.emulateMedia({ media: 'print' });
	await expect(page.getByRole('banner').first()).toBeHidden();
	await expect(page.getByRole('button', { name: 'Print' })).toBeHidden();
	await expect(page.getByText('does not replace clinical judgement')).toBeVisible();
});

test('the front desk sees the latest value only, and nothing to decide', async ({ page }) => {
	await asPediatrician(page);
	await open(page, 'Sørensen');
	const path = new URL(page.url()).pathname;
	await page.context().clearCookies();
	await signIn(page, 'desk@example.org');
	await page.goto(path);
	await expect(part(page, 'Latest value')).toContainText('mg/dL');
	for (const name of ['Decide', 'New value', 'By the standard, now', 'Values', 'Decisions']) {
		await expect(part(page, name)).toHaveCount(0);
	}
	await expectAccessible(page);
	expect((await page.goto(`${path}/summary`))?.status()).toBe(403);
	await page.context().clearCookies();
	await signIn(page, 'pediatrician.mill@example.org');
	expect((await page.goto(path))?.status()).toBe(404);
});

test('measures stand with their definitions, and pages fit a telephone in the dark', async ({ page }) => {
	await page.setViewportSize({ width: 390, height: 844 });
	await page.emulateMedia({ colorScheme: 'dark' });
	await asPediatrician(page);
	for (const path of ['/measures?days=90', '/waiting']) {
		await page.goto(path);
		await expectAccessible(page);
		expect(await page.evaluate(() => document.documentElement.scrollWidth <= innerWidth)).toBe(true);
	}
	await page.goto('/measures?days=90');
	await expect(page.getByText('Seen inside the window')).toBeVisible();
	await expect(page.getByText('no published benchmark was found').first()).toBeVisible();
	await open(page, 'Sørensen');
	await expectAccessible(page);
	expect(await page.evaluate(() => document.documentElement.scrollWidth <= innerWidth)).toBe(true);
});

test('without scripts a wrong value comes back with its sentence and what was typed', async ({ browser }) => {
	const context = await browser.newContext({ javaScriptEnabled: false });
	const page = await context.newPage();
	await asPediatrician(page);
	await page.goto('/waiting');
	await page.getByRole('link', { name: /^Sørensen/ }).click();
	const form = part(page, 'New value');
	await form.getByLabel('Total').fill('14.2');
	await form.getByLabel('Direct').fill('20');
	await form.getByRole('button', { name: 'Save the value' }).click();
	await expect(form.getByText('The direct part cannot be more than the total.').first()).toBeVisible();
	await expect(form.getByLabel('Total')).toHaveValue('14.2');
	await context.close();
});

test('a newborn who came without being on record is entered at the clinic', async ({ page }) => {
	await asPediatrician(page);
	await page.goto('/search?q=Nobodybythatname');
	await page.getByRole('link', { name: 'Enter a newborn' }).click();
	await expect(page.getByRole('heading', { level: 1, name: 'New discharge' })).toBeVisible();
	await scripted(page);
	await expect(page.getByLabel('Clinic', { exact: true }).locator('option:not([value=""])')).toHaveCount(1);
	await fillNewborn(page, 'E2E-UNANNOUNCED');
	await expectAccessible(page);
	await page.getByRole('button', { name: 'Save for now' }).click();
	await page.waitForURL(/\/discharges\/[a-z0-9]+\?saved=1$/);
	await expect(page.getByLabel('Record number', { exact: true })).toHaveValue('E2E-UNANNOUNCED');
});

test('a newborn under phototherapy, now below the line, does not read as at or over it', async ({ page }) => {
	await asPediatrician(page);
	await open(page, 'Sørensen');
	const standard = part(page, 'By the standard, now');
	await expect(standard).toContainText(/mg\/dL over the phototherapy line/);
	const form = part(page, 'New value');
	await form.getByRole('radio', { name: 'TSB' }).check();
	await form.getByLabel('Total').fill('10.2');
	await form.getByRole('button', { name: 'Now', exact: true }).click();
	await expect(form.getByText('With this value, not saved yet:')).toBeVisible();
	await form.getByRole('button', { name: 'Save the value' }).click();
	await expect(page.getByRole('status').filter({ hasText: 'The value is saved.' })).toBeVisible();

	await expect(standard).toContainText('Phototherapy is running.');
	await expect(standard).toContainText(/mg\/dL below the phototherapy line/);
	expect(await standard.innerText()).not.toMatch(/at or over|over the phototherapy line|threshold met/i);
	await page.getByRole('link', { name: 'Summary for the record' }).click();
	await expect(page.getByText('The value stands', { exact: true }).locator('+ dd')).toHaveText(
		/below the phototherapy line/
	);
	await page.goto('/waiting');
	const row = page.getByRole('row').filter({ hasText: 'Sørensen' });
	await expect(row).toContainText(/mg\/dL below the phototherapy line/);
	await expect(row).not.toContainText(/at or over|over the phototherapy line|threshold met/i);
	await expectAccessible(page);
});
