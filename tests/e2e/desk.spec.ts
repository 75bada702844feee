import AxeBuilder from '@axe-core/playwright';
import { expect, test, type Locator, type Page } from '@playwright/test';

/** Everybody of the demo has the same password; see the sign-ins that the start command prints. */
const PASSWORD = 'paper ink amber 2026';

async function signIn(page: Page, email: string): Promise<void> {
	await page.goto('/sign-in');
	await page.getByLabel('E-mail').fill(email);
	await page.getByLabel('Password').fill(PASSWORD);
	await page.getByRole('button', { name: 'Sign in' }).click();
	await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
}

async function signInAgain(page: Page, email: string): Promise<void> {
	await page.context().clearCookies();
	await signIn(page, email);
}

const asDesk = (page: Page) => signIn(page, 'desk@example.org');

/** Scripts are running: before that, keys do nothing and a form would be sent whole. */
const scripted = (page: Page): Promise<void> => page.waitForLoadState('networkidle');

async function expectAccessible(page: Page): Promise<void> {
	const { violations } = await new AxeBuilder({ page })
		.withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa'])
		.analyze();
	expect(
		violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target.join(' ')).join(', ')}`)
	).toEqual([]);
}

async function expectNoSidewaysScroll(page: Page): Promise<void> {
	const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
	expect(over).toBeLessThanOrEqual(0);
}

const rows = (page: Page): Locator =>
	page.getByRole('list', { name: 'Newborns in the order of the work' }).getByRole('listitem');
const rowOf = (page: Page, familyName: string): Locator => rows(page).filter({ hasText: `${familyName},` });
const panel = (page: Page): Locator => page.locator('section[aria-labelledby="call-panel-title"]');
const part = (page: Page, name: string): Locator => panel(page).getByRole('region', { name, exact: true });

async function openPanel(page: Page, familyName: string, group = ''): Promise<void> {
	await page.goto(`/queue${group === '' ? '' : `?show=${group}`}`);
	await scripted(page);
	await rowOf(page, familyName).locator('[data-row-link]').click();
	await expect(panel(page).getByRole('heading', { level: 2 })).toContainText(familyName);
}

test.describe('the queue', () => {
	test('starts with what cannot wait, says why each newborn is in it, and counts its groups', async ({
		page
	}) => {
		await asDesk(page);
		await expect(page).toHaveURL(/\/queue$/);
		await expect(rows(page).first()).toContainText('Check-in: emergency');
		await expect(rowOf(page, 'Marchetti')).toContainText('Reach the family');
		await expect(rowOf(page, 'Marchetti').getByRole('link', { name: /^Call / })).toHaveAttribute(
			'href',
			/^tel:\+1/
		);
		await expect(page.getByText('does not replace clinical judgement')).toBeVisible();
		const groups = page.getByRole('navigation', { name: 'Groups of the queue' });
		const missed = groups.getByRole('link', { name: /Did not come/ });
		const count = Number(/\d+/.exec((await missed.textContent()) ?? '')?.[0]);
		await missed.click();
		await expect(page).toHaveURL(/show=did-not-come/);
		await expect(rows(page)).toHaveCount(count);
		await expectAccessible(page);
	});

	test('is walked, opened and left by keyboard, and the place is kept', async ({ page }) => {
		await asDesk(page);
		await page.goto('/queue');
		await scripted(page);
		await page.keyboard.press('j');
		await page.keyboard.press('j');
		await page.keyboard.press('j');
		const third = rows(page).nth(2).locator('[data-row-link]');
		await expect(third).toBeFocused();
		const name = (await third.textContent())?.trim() ?? '';
		await page.keyboard.press('Enter');
		const title = panel(page).getByRole('heading', { level: 2 });
		await expect(title).toHaveText(name);
		await expect(title).toBeFocused();
		await page.keyboard.press('c');
		await expect(page.locator('#log-call')).toBeFocused();
		await page.keyboard.press('v');
		await expect(page.locator('#visit')).toBeFocused();
		await page.keyboard.press('Escape');
		await expect(panel(page)).toHaveCount(0);
		await expect(third).toBeFocused();
	});

	test('refreshes by itself without moving the focus, and says so when it cannot', async ({ page }) => {
		await page.clock.install();
		await asDesk(page);
		await page.goto('/queue');
		await scripted(page);
		const second = rows(page).nth(1).locator('[data-row-link]');
		await second.focus();
		const fresh = page.waitForResponse((response) => response.url().includes('/api/v1/queue'));
		await page.clock.runFor(31_000);
		expect((await fresh).status()).toBe(200);
		await expect(second).toBeFocused();
		await page.route('**/api/v1/queue**', (route) => route.abort());
		await page.clock.runFor(70_000);
		await expect(page.getByText('The list could not be refreshed')).toBeVisible();
		await expect(second).toBeFocused();
	});

	test('works on a telephone: one column, the panel in place of the list', async ({ page }) => {
		await page.setViewportSize({ width: 390, height: 844 });
		await asDesk(page);
		await openPanel(page, 'Marchetti', 'did-not-come');
		await expect(rows(page).first()).toBeHidden();
		await expectNoSidewaysScroll(page);
		await expectAccessible(page);
		await page.getByRole('link', { name: 'Back to the queue' }).click();
		await expect(rows(page).first()).toBeVisible();
		await expect(page).toHaveURL(/\/queue\?show=did-not-come$/);
		await expectNoSidewaysScroll(page);
	});
});

test.describe('texts from numbers we do not know', () => {
	const strays = (page: Page): Locator =>
		page.getByRole('region', { name: 'Texts from numbers we do not know' }).getByRole('listitem');
	const ofNumber = (page: Page, number: string): Locator =>
		strays(page).filter({ has: page.getByRole('link', { name: `Call ${number}` }) });
	const textPanel = (page: Page): Locator => page.locator('section[aria-labelledby="stray-title"]');
	const panelPart = (page: Page, name: string): Locator =>
		textPanel(page).getByRole('region', { name, exact: true });

	test('stand above the rows, alarming ones first, and say what was done for them', async ({ page }) => {
		await asDesk(page);
		await page.goto('/queue');
		await expect(strays(page).first()).toContainText('(202) 555-0158');
		await expect(strays(page).first()).toContainText('May be an emergency');
		await expect(strays(page).first()).toContainText('The emergency advice was sent to this number.');
		await expect(ofNumber(page, '(202) 555-0163')).toContainText('this is Rosa, the grandmother');
		await expect(ofNumber(page, '(202) 555-0163')).not.toContainText('May be an emergency');
		await expectAccessible(page);
		await signInAgain(page, 'desk.mill@example.org');
		await expect(strays(page).first()).toContainText('(202) 555-0158');
	});

	test('are read in the dark and on a telephone, the panel in place of the list', async ({ page }) => {
		await page.emulateMedia({ colorScheme: 'dark' });
		await page.setViewportSize({ width: 390, height: 844 });
		await asDesk(page);
		await page.goto('/queue');
		await scripted(page);
		await expectNoSidewaysScroll(page);
		await strays(page)
			.first()
			.getByRole('link', { name: /^It is about/ })
			.click();
		await expect(textPanel(page)).toContainText('These words may be an emergency.');
		await expect(rows(page).first()).toBeHidden();
		await expectNoSidewaysScroll(page);
		await expectAccessible(page);
		await page.keyboard.press('Escape');
		await expect(
			strays(page)
				.first()
				.getByRole('link', { name: /^It is about/ })
		).toBeFocused();
	});

	test('are put into the thread of the newborn that they are about', async ({ page }) => {
		await asDesk(page);
		await page.goto('/queue');
		await scripted(page);
		await ofNumber(page, '(202) 555-0158')
			.getByRole('link', { name: /^It is about/ })
			.click();
		await expect(textPanel(page)).toContainText('These words may be an emergency. Call this number now.');
		await expect(page.locator('#stray-title')).toBeFocused();
		const about = panelPart(page, 'It is about …');
		await about.getByLabel('Name, date of birth or record number').fill('Farou');
		const newborn = about.getByRole('radio', { name: /^Farouk, Yusuf/ });
		await expect(newborn).toBeVisible();
		await about.getByRole('button', { name: 'Put it into' }).click();
		await expect(about).toContainText('Choose a newborn.');
		await newborn.check();
		await expectAccessible(page);
		await about.getByRole('button', { name: 'Put it into' }).click();
		await expect(page.getByText('The text is in the thread with this family.')).toBeFocused();
		await expect(part(page, 'Also owed')).toContainText('Alarming words from the family');
		await expect(part(page, 'Also owed')).toContainText('will not wake up to feed');
		await expect(ofNumber(page, '(202) 555-0158')).toHaveCount(0);
		await panel(page).getByRole('link', { name: 'Thread with the family' }).click();
		const said = page.getByRole('list', { name: 'Oldest first' });
		await expect(said).toContainText('(202) 555-0158');
		await expect(said).toContainText('will not wake up to feed');
		await expect(said).toContainText('Emergency advice');
	});

	test('are settled with a reason where they are not ours; whoever comes second is told', async ({
		page,
		browser,
		baseURL
	}) => {
		await asDesk(page);
		await page.goto('/queue');
		await scripted(page);
		await ofNumber(page, '(202) 555-0163')
			.getByRole('link', { name: /^Not one of ours/ })
			.click();
		await expect(page.locator('#not-ours')).toBeFocused();
		const address = new URL(page.url()).pathname;
		const second = await browser.newContext({ javaScriptEnabled: false, ...(baseURL ? { baseURL } : {}) });
		const other = await second.newPage();
		await signIn(other, 'desk.mill@example.org');
		await other.goto(`${address}?q=Okafor`);
		await other.getByRole('radio', { name: /^Okafor/ }).check({ force: true });

		const notOurs = panelPart(page, 'Not one of ours');
		await notOurs.getByLabel('Why it is not one of ours').fill('Meant for another clinic');
		await notOurs.getByRole('button', { name: 'Not one of ours' }).click();
		await expect(page.getByText('Marked as not one of ours.')).toBeFocused();
		await expect(ofNumber(page, '(202) 555-0163')).toHaveCount(0);

		await other.getByRole('button', { name: 'Put it into' }).click();
		await expect(textPanel(other)).toContainText('Dario Fenwick marked it as not one of ours');
		await second.close();
	});
});

test.describe('the call panel', () => {
	test('writes down a call, asks for its outcome first, and keeps what was typed', async ({ page }) => {
		await asDesk(page);
		await openPanel(page, 'Marchetti');
		await expect(part(page, 'What to say')).toContainText('The family did not come');
		await expect(part(page, 'What to say')).toContainText('Ways to reach the family');
		await expectAccessible(page);
		const log = part(page, 'Write down the call');
		await log.getByLabel('Note').fill('Rang twice, mailbox full');
		await log.getByRole('button', { name: 'Write it down' }).click();
		await expect(log.getByLabel('Note')).toHaveValue('Rang twice, mailbox full');
		await log.getByLabel('Nobody answered').check();
		await log.getByRole('button', { name: 'Write it down' }).click();
		const told = page.getByText('The try was written down.');
		await expect(told).toBeFocused();
		await expect(part(page, 'Calls and answers so far')).toContainText('Rang twice, mailbox full');
		await expect(rowOf(page, 'Marchetti')).toContainText('Call: nobody answered');
		await expect(log.getByLabel('Note')).toHaveValue('');
	});

	test('confirms a visit, and the row leaves the group', async ({ page }) => {
		await asDesk(page);
		await openPanel(page, 'Farouk', 'not-confirmed');
		await part(page, 'Visit').getByRole('button', { name: 'Mark as confirmed' }).click();
		await expect(page.getByText('Marked as confirmed.')).toBeFocused();
		await expect(part(page, 'Visit')).toContainText('Confirmed');
		await expect(rowOf(page, 'Farouk')).toHaveCount(0);
	});

	test('settles an answer of the family with how it was settled', async ({ page }) => {
		await asDesk(page);
		await openPanel(page, 'Silva', 'needs-call');
		const owed = part(page, 'Also owed');
		await expect(owed).toContainText('Check-in: call back');
		await owed.getByLabel('How it was settled').fill('Called, feeds go well, visit stands.');
		await owed.getByRole('button', { name: 'Settle' }).click();
		await expect(page.getByText('Settled.', { exact: true })).toBeFocused();
		await expect(part(page, 'Calls and answers so far')).toContainText(
			'Called, feeds go well, visit stands.'
		);
	});

	test('moves a visit to another place inside the window', async ({ page }) => {
		await asDesk(page);
		await openPanel(page, 'Novak');
		const visit = part(page, 'Visit');
		await visit.getByText('Move the visit', { exact: true }).click();
		const places = visit.getByRole('group', { name: 'Free places inside the window' }).getByRole('radio');
		await places.last().check({ force: true });
		await visit.getByLabel('Why it moves').fill('The father works in the morning');
		await visit.getByRole('button', { name: 'Move the visit here' }).click();
		await expect(page.getByRole('status').filter({ hasText: 'The visit was moved.' })).toBeFocused();
		await expect(part(page, 'Also owed')).toHaveCount(0);
	});

	test('asks for a time outside the window, and the pediatrician approves it', async ({ page }) => {
		await asDesk(page);
		await openPanel(page, 'Tadesse', 'needs-visit');
		const visit = part(page, 'Visit');
		await visit.getByText('Ask for a time outside the window', { exact: true }).click();
		const outside = visit.getByRole('group', { name: 'Free places outside the window' });
		await outside.getByRole('radio').first().check({ force: true });
		await visit.getByLabel('Why this time').fill('First time they can come');
		await visit.getByRole('button', { name: 'Ask the pediatrician' }).click();
		await expect(page.getByText('The pediatrician was asked.')).toBeFocused();
		await expect(part(page, 'Also owed')).toContainText('First time they can come');
		await expect(part(page, 'Also owed').getByRole('button')).toHaveCount(0);
		const address = page.url();
		await page.context().clearCookies();
		await signIn(page, 'pediatrician@example.org');
		await page.goto(address);
		await scripted(page);
		const owed = part(page, 'Also owed');
		await owed.getByLabel(/is right$/).fill('Treated, value falling');
		await owed.getByRole('button', { name: 'Approve and book' }).click();
		await expect(page.getByText('Approved and booked.')).toBeFocused();
		await expect(part(page, 'Visit')).toContainText('outside the window, approved');
	});

	test('says that a window has passed, and offers to ask for a time outside it', async ({ page }) => {
		await asDesk(page);
		await openPanel(page, 'Karimova', 'needs-visit');
		const visit = part(page, 'Visit');
		await expect(visit.getByText('The window has passed')).toBeVisible();
		await expect(visit.getByText('Ask the pediatrician below to approve a time.')).toBeVisible();
		await expect(visit.getByRole('button', { name: 'Book this place' })).toHaveCount(0);
		await expect(visit.getByRole('group', { name: 'Free places outside the window' })).toBeVisible();
		await expectAccessible(page);
	});

	test('works without scripts', async ({ browser, baseURL }) => {
		const context = await browser.newContext({ javaScriptEnabled: false, ...(baseURL ? { baseURL } : {}) });
		const page = await context.newPage();
		await asDesk(page);
		await page.goto('/queue?show=did-not-come');
		await rowOf(page, 'Achterberg').locator('[data-row-link]').click();
		const log = part(page, 'Write down the call');
		await log.getByText('Left a voice message').click();
		await log.getByRole('button', { name: 'Write it down' }).click();
		await expect(page.getByText('The try was written down.')).toBeVisible();
		await expect(page).toHaveURL(/show=did-not-come/);
		await context.close();
	});

	test('of another clinic does not exist', async ({ page }) => {
		await asDesk(page);
		await openPanel(page, 'Marchetti');
		const { pathname } = new URL(page.url());
		await page.context().clearCookies();
		await signIn(page, 'desk.mill@example.org');
		const answer = await page.goto(pathname);
		expect(answer?.status()).toBe(404);
	});
});

test.describe('the calendar', () => {
	test('shows the week, and a place is chosen inside the bracket of the window', async ({ page }) => {
		await asDesk(page);
		await page.goto('/calendar');
		await expect(page.getByRole('heading', { level: 2 })).toHaveCount(7);
		await expect(page.getByText('today', { exact: true })).toBeVisible();
		await expectAccessible(page);
		await openPanel(page, 'Mbeki', 'needs-visit');
		await part(page, 'Visit').getByRole('link', { name: 'Choose on the calendar' }).click();
		await expect(page.getByRole('heading', { name: /Choose a place for Mbeki/ })).toBeVisible();
		await expect(page.getByText(/^Window from/)).toBeVisible();
		await expectAccessible(page);
		await page
			.getByRole('link', { name: /: Choose/ })
			.last()
			.click();
		await page.getByRole('button', { name: 'Book this place' }).click();
		await expect(page).toHaveURL(/\/queue\/[a-z0-9]{16}\?done=booked/);
		await expect(page.getByText('The visit is booked.')).toBeVisible();
	});

	test('goes through the weeks by keyboard, and day by day on a telephone', async ({ page }) => {
		await asDesk(page);
		await page.goto('/calendar');
		await scripted(page);
		const first = page.getByRole('heading', { level: 2 }).first();
		const thisWeek = await first.textContent();
		await page.keyboard.press(']');
		await expect(first).not.toHaveText(thisWeek ?? '');
		await page.keyboard.press('t');
		await expect(first).toHaveText(thisWeek ?? '');
		await page.setViewportSize({ width: 390, height: 844 });
		await expect(page.getByRole('heading', { level: 2 })).toHaveCount(1);
		await page.getByRole('navigation', { name: 'Days of the week' }).getByRole('link').last().click();
		await expect(page.getByRole('heading', { level: 2 })).toHaveCount(1);
		await expect(page.getByRole('heading', { level: 2 })).toContainText('Sun');
		await expectNoSidewaysScroll(page);
		await expectAccessible(page);
	});
});

test('the morning list marks who came, prints without its buttons, and says when nobody is booked', async ({
	page
}) => {
	await asDesk(page);
	await page.goto('/morning');
	await scripted(page);
	const visits = page.getByRole('list', { name: 'Visits in order of time' }).getByRole('listitem');
	await expect(visits.first()).toBeVisible();
	await expectAccessible(page);
	const row = visits.filter({ has: page.getByRole('button', { name: /^Arrived ?:/ }) }).first();
	const name = (await row.locator('[data-row-link]').textContent())?.trim() ?? '';
	await row.getByRole('button', { name: /^Arrived ?:/ }).click();
	await expect(page.getByText('Marked as arrived.')).toBeVisible();
	const marked = visits.filter({ hasText: name }).filter({ hasText: 'Came' });
	await expect(marked.getByRole('button')).toHaveCount(0);
	await page.emulateMedia({ media: 'print' });
	await expect(page.getByRole('button')).toHaveCount(0);
	await page.emulateMedia({ media: 'screen' });
	await page.goto('/morning?on=2031-01-01');
	await expect(page.getByText('No visits on this day')).toBeVisible();
	await expect(page.getByRole('link', { name: 'Who needs a visit' })).toBeVisible();
});

test('search finds by name while typing, by record number, telephone and date, and says when nobody is found', async ({
	page
}) => {
	await asDesk(page);
	await page.getByRole('search').getByRole('searchbox').fill('Marchetti');
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL(/\/search\?q=Marchetti/);
	const found = page.getByRole('table', { name: 'Newborns found' });
	await expect(found.getByRole('link', { name: 'Marchetti, Leo', exact: true })).toBeVisible();
	const record = (await found.getByRole('cell').nth(2).textContent())?.match(/[A-Z]+-\d+/)?.[0] ?? '';
	await expectAccessible(page);
	await scripted(page);
	const box = page.getByLabel('Name, date of birth, telephone or record number').last();
	await box.fill(record);
	await expect(found.getByRole('link', { name: 'Marchetti, Leo', exact: true })).toBeVisible();
	await expect(page.getByText('1 found')).toBeVisible();
	await box.fill('Nobody of that name');
	await expect(page.getByText('No newborn of your sites matches')).toBeVisible();
	await box.fill('M');
	await expect(page.getByText('Nothing was searched for yet')).toBeVisible();
});

test('help names the emergency number and the telephone after hours', async ({ page }) => {
	await asDesk(page);
	await page.goto('/help');
	await expect(page.getByRole('link', { name: '911' })).toHaveAttribute('href', 'tel:911');
	await expect(page.getByText('After hours').first()).toBeVisible();
	const danger = page.getByRole('region', { name: 'A newborn in danger' });
	await expect(danger.getByRole('listitem')).toHaveText([
		'cannot be woken',
		'will not feed',
		'is limp',
		'arches the neck or back',
		'has a high-pitched cry',
		'has pauses in breathing',
		'has a seizure',
		'has 38.0 °C or more'
	]);
	await expectAccessible(page);
});

test('every desk screen is accessible in the dark and on a telephone', async ({ page }) => {
	await page.emulateMedia({ colorScheme: 'dark' });
	await page.setViewportSize({ width: 390, height: 844 });
	await asDesk(page);
	for (const path of ['/queue', '/calendar', '/morning', '/search?q=a', '/help']) {
		await page.goto(path);
		await expectAccessible(page);
		await expectNoSidewaysScroll(page);
	}
});
