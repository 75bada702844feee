import AxeBuilder from '@axe-core/playwright';
import { expect, test, type Locator, type Page } from '@playwright/test';
import { fillNewborn } from './fill-newborn';

/** Everybody of the demo has the same password; see the sign-ins that the start command prints. */
const PASSWORD = 'paper ink amber 2026';

async function asNurse(page: Page): Promise<void> {
	await page.goto('/sign-in');
	await page.getByLabel('E-mail').fill('nurse@example.org');
	await page.getByLabel('Password').fill(PASSWORD);
	await page.getByRole('button', { name: 'Sign in' }).click();
	await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
}

/** Scripts are running: the buttons that need them are there. */
async function openNew(page: Page): Promise<void> {
	await page.goto('/discharges/new');
	await expect(page.getByRole('button', { name: 'Add a value' })).toBeVisible();
}

async function expectAccessible(page: Page): Promise<void> {
	const { violations } = await new AxeBuilder({ page })
		.withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa'])
		.analyze();
	expect(
		violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target.join(' ')).join(', ')}`)
	).toEqual([]);
}

const stepsIn = (within: Locator) =>
	within.getByRole('list', { name: 'Steps from the values to the result' }).getByRole('listitem');
const cautionsIn = (within: Locator) => within.getByRole('list', { name: 'Cautions' }).getByRole('listitem');
/** A4 without the margins of 11 mm, in CSS pixels. */
const A4 = { width: 710, height: 1039 };

const result = (page: Page) => page.getByRole('region', { name: 'Result' });

test('the list says who goes home, what is missing and until when, and opens by keyboard', async ({
	page
}) => {
	test.slow();
	await asNurse(page);
	await page.goto('/discharges', { waitUntil: 'networkidle' });
	const leaving = page.getByRole('table', { name: 'Newborns who still go home from here' });
	await expect(leaving.getByText('bilirubin value').first()).toBeVisible();
	await expect(leaving.getByText('left').first()).toBeVisible();
	await expect(leaving.getByRole('img').first()).toHaveAttribute('aria-label', /^Age \d+ h\./);
	await expectAccessible(page);
	await page.keyboard.press('j');
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL(/\/discharges\/[a-z0-9]+$/);
	await expectAccessible(page);
});

test('an empty form says everything that is missing beside its field, and nothing typed is lost', async ({
	page
}) => {
	await asNurse(page);
	await openNew(page);
	await page.getByLabel('Given name').fill('Inés');
	await page.locator('[id="measurementTotal[0]"]').fill('nine');
	await page.getByRole('button', { name: 'Save for now' }).click();
	const summary = page.getByRole('alert');
	await expect(summary).toBeFocused();
	await expect(summary).toContainText('Give the family name.');
	await expect(page.getByLabel('Given name')).toHaveValue('Inés');
	await expect(page.locator('[id="measurementTotal[0]"]')).toHaveValue('nine');
	await expect(page.locator('[id="measurementTotal[0]"]')).toHaveAttribute('aria-invalid', 'true');
	await summary.getByRole('link', { name: 'Give the family name.' }).click();
	await expect(page.getByLabel('Family name')).toBeFocused();
	await expectAccessible(page);
});

test('the result follows while typing, and a newborn goes home with a visit, a message and a sheet', async ({
	page
}) => {
	test.slow();
	await asNurse(page);
	await openNew(page);
	await expect(result(page)).toContainText('Still needed: date and time of birth and gestational age');
	await fillNewborn(page, `E2E-${Date.now()}`);
	await expect(result(page)).toContainText('Follow up in the window');
	await expect(result(page)).toContainText(/mg\/dL below the phototherapy line/);
	await result(page).getByText(/^Why:/).click();
	await expect(result(page)).toContainText('AAP 2022');

	// A higher value asks for more, at once and without saving.
	await page.locator('[id="measurementTotal[0]"]').fill('24');
	await expect(result(page)).toContainText(/mg\/dL over the (phototherapy|escalation|exchange) line/);
	await expect(page.getByText('No visit yet')).toBeVisible();
	await page.locator('[id="measurementTotal[0]"]').fill('9,4');

	const places = page.getByRole('group', { name: /^Free places at/ });
	await places
		.getByRole('radio', { name: /^\d\d:\d\d/ })
		.first()
		.check();
	await expectAccessible(page);
	await page.getByRole('button', { name: 'Book, message the family and hand over' }).click();

	await expect(page).toHaveURL(/\/sheet\?done=1$/);
	const sheet = page.getByRole('article');
	await expect(sheet).toContainText('Su cita');
	await expect(sheet).toContainText('9.4 mg/dL');
	await expect(sheet).toContainText(/\/v\/[\w-]{22}/);
	await expect(sheet.getByRole('img')).toBeVisible();
	await expectAccessible(page);

	await page.goto('/discharges');
	const gone = page.getByRole('table', { name: 'Newborns handed over to a clinic today' });
	await expect(gone.getByRole('link', { name: 'Aldana, Inés' }).first()).toBeVisible();
	await gone.getByRole('link', { name: 'Aldana, Inés' }).first().click();
	await expect(page.getByText('The values belong to the clinic now')).toBeVisible();
});

test('the second page of the sheet is the written hand-over, with every reason and every caution', async ({
	page
}) => {
	test.slow();
	await asNurse(page);
	await openNew(page);
	await fillNewborn(page, `E2E-H${Date.now()}`);
	await page.getByRole('checkbox', { name: /^Ceftriaxone or a sulfonamide/ }).check();
	await page.getByRole('button', { name: 'Save for now' }).click();
	await expect(page.getByText('Not finished yet')).toBeVisible();
	await result(page).getByText(/^Why:/).click();
	const steps = stepsIn(result(page));
	await expect(steps.first()).toBeVisible();
	const reasons = await steps.allInnerTexts();
	const cautions = await cautionsIn(result(page)).allInnerTexts();
	expect(reasons.length).toBeGreaterThan(3);
	expect(cautions.join()).toMatch(/ceftriaxone/i);

	await page.goto(`${new URL(page.url()).pathname}/sheet`);
	const handOver = page.getByRole('region', { name: 'For the clinician who sees the newborn next' });
	expect(await stepsIn(handOver).allInnerTexts()).toEqual(reasons);
	for (const step of await stepsIn(handOver).all())
		await expect(step).toContainText(/(AAP 2022|NASPGHAN|Neither standard prints).* · \w+/);
	expect(await cautionsIn(handOver).allInnerTexts()).toEqual(cautions);
	await expect(handOver).toContainText('9.4 mg/dL');
	await expect(handOver).toContainText('does not replace clinical judgement');
	await expectAccessible(page);

	// The family's page comes first, carries no value, and fits one sheet of A4 within its margins.
	const family = page.getByRole('article').locator('> div').first();
	await expect(family).not.toContainText(/mg\/dL|µmol/);
	await expect(family).toContainText(/tiene una convulsión o tiene 38\.0\s°C.*llame al 911 ahora/);
	await expect(family).toContainText('no moja el pañal en 8 horas');
	await page.emulateMedia({ media: 'print' });
	await page.setViewportSize({ width: A4.width, height: A4.height });
	expect((await family.boundingBox())?.height).toBeLessThan(A4.height);
	await expect(handOver).toHaveCSS('break-before', 'page');
	await page.emulateMedia({ media: 'screen', colorScheme: 'dark' });
	await page.setViewportSize({ width: 390, height: 844 });
	expect(await page.evaluate(() => document.documentElement.scrollWidth <= innerWidth)).toBe(true);
	await expectAccessible(page);
});

test('a discharge is saved before everything is known, and a record number is taken only once', async ({
	page
}) => {
	await asNurse(page);
	await openNew(page);
	const recordNumber = `E2E-S${Date.now()}`;
	await fillNewborn(page, recordNumber);
	await page.getByRole('button', { name: 'Save for now' }).click();
	await expect(page.getByText('Not finished yet')).toBeVisible();
	await expect(page.locator('[id="measurementTotal[0]"]')).toHaveValue('9.4');

	await page.getByRole('link', { name: 'Enter a twin with the same family' }).click();
	await expect(page.getByRole('heading', { level: 1, name: 'New discharge' })).toBeVisible();
	await expect(page.getByLabel('Name', { exact: true }).first()).toHaveValue('Lucía Aldana');
	await fillNewborn(page, recordNumber);
	await page.getByRole('button', { name: 'Save for now' }).click();
	await expect(page.getByText('Another newborn already has this record number.')).toBeVisible();
	await expect(page.getByLabel('Family name')).toHaveValue('Aldana');
});

test('without scripts the form still saves and still says what is wrong', async ({ browser, baseURL }) => {
	const context = await browser.newContext({ javaScriptEnabled: false, ...(baseURL ? { baseURL } : {}) });
	const page = await context.newPage();
	await asNurse(page);
	await page.goto('/discharges/new');
	await page.getByLabel('Family name').fill('Ruiz');
	await page.getByRole('button', { name: 'Save for now' }).click();
	await expect(page.getByRole('alert')).toContainText('Give the record number.');
	await expect(page.getByLabel('Family name')).toHaveValue('Ruiz');
	await context.close();
});
