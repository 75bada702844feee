import { AxeBuilder } from '@axe-core/playwright';
import { expect, test, type Browser, type Page } from '@playwright/test';
import { DateTime } from 'luxon';
import mysql from 'mysql2/promise';
import { DEMO_PASSWORD } from '../../jobs/demo/organisation';
import { expectLight } from './page-weight';
import { databaseUrl, fakesUrl, origin } from './stack';

/**
 * The whole job with every hand-over real: the nurse's discharge reaches the parent's telephone through the worker and
 * the SMS SDK, the parent's answers reach the desk, the value reaches the pediatrician, and the loop closes.
 */

const FAMILY = `Story-${Date.now().toString(36)}`;
/** From the range kept for fiction, another one each run, so that an older message is never taken for this one. */
const TELEPHONE = `+131255501${String(Date.now() % 100).padStart(2, '0')}`;

// A step that cannot be taken says so soon, though the whole story may take its time.
test.use({ actionTimeout: 20_000 });

async function signedIn(browser: Browser, email: string): Promise<Page> {
	const page = await (await browser.newContext({ baseURL: origin() })).newPage();
	await page.goto('/sign-in');
	await page.getByLabel('E-mail').fill(email);
	await page.getByLabel('Password').fill(DEMO_PASSWORD);
	await page.getByRole('button', { name: /sign in/i }).click();
	await expect(page).not.toHaveURL(/sign-in/, { timeout: 30_000 });
	return page;
}

/** The demo's city lies in a zone chosen when it was loaded; the forms speak its local time. */
async function demoZone(): Promise<string> {
	const connection = await mysql.createConnection({ uri: databaseUrl() });
	try {
		const [rows] = await connection.query<mysql.RowDataPacket[]>(
			'select time_zone as zone from sites limit 1'
		);
		return String(rows[0]?.zone);
	} finally {
		await connection.end();
	}
}

async function nurseDischarges(page: Page, zone: string): Promise<void> {
	const now = DateTime.now().setZone(zone).startOf('minute');
	const born = now.minus({ hours: 40 });
	const taken = born.plus({ hours: 36 });
	await page.goto('/discharges/new');
	const birth = page.locator('#birth');
	await birth.getByLabel('Family name').fill(FAMILY);
	await birth.getByLabel('Given name').fill('Robin');
	await birth.getByLabel('Record number').fill(FAMILY);
	await birth.getByLabel('Birth weight, g').fill('3400');
	await page.locator('#bornOn').fill(born.toFormat('yyyy-MM-dd'));
	await page.locator('#bornTime').fill(born.toFormat('HH:mm'));
	await page.locator('#gestationWeeks').fill('39');
	await page.locator('#gestationDays').fill('0');
	await page.locator('select[name=measurementMethod]').first().selectOption('serum');
	// 39 weeks, no risk factor, 36 hours: line 14.8 mg/dL in the published table, so the difference is 2.5.
	await page.locator('input[name=measurementTotal]').first().fill('12.3');
	await page.locator('input[name=measurementOn]').first().fill(taken.toFormat('yyyy-MM-dd'));
	await page.locator('input[name=measurementTime]').first().fill(taken.toFormat('HH:mm'));
	await page.locator('#dischargeOn').fill(now.toFormat('yyyy-MM-dd'));
	await page.locator('#dischargeTime').fill(now.toFormat('HH:mm'));
	await page.locator('input[name=feeding][value=breast]').check();
	const family = page.locator('#family');
	await family.locator('[name=carer1Name]').fill('Story Parent');
	await family.locator('[name=carer1Phone]').fill(TELEPHONE);
	await family.locator('[name=carer1Email]').fill('story@example.org');
	await family.locator('[name=carer1Sms]').check();
	await family.locator('[name=carer1Mail]').check();
	await page.locator('#clinicId').selectOption({ label: 'Harbor Lane Newborn Clinic' });
	await expect(page.getByText('14.8', { exact: false }).first()).toBeVisible();
	await page.locator('#visit dd input[name=place]').first().check();
	await page.getByRole('button', { name: 'Book, message the family and hand over' }).click();
	await expect(page).toHaveURL(/\/discharges\/[a-z0-9]{16}\/sheet/);
	await expect(page.getByText('Point your phone at this')).toBeVisible();
}

async function linkOnTelephone(page: Page): Promise<string> {
	let link = '';
	await expect
		.poll(
			async () => {
				const response = await page.request.get(
					`${fakesUrl()}/control/sms?to=${encodeURIComponent(TELEPHONE)}`
				);
				const text = JSON.stringify(await response.json());
				link = /https?:[^\s"\\]*\/v\/[\w-]{22}/.exec(text)?.[0] ?? '';
				return link;
			},
			{ timeout: 45_000, message: 'the worker sends the confirmation to the telephone' }
		)
		.not.toBe('');
	return link;
}

async function expectAccessible(page: Page): Promise<void> {
	const { violations } = await new AxeBuilder({ page }).analyze();
	expect(violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html ?? ''}`)).toEqual([]);
}

async function parentAnswers(page: Page, link: string): Promise<void> {
	await page.goto(link);
	await expect(page.getByRole('heading', { level: 1 })).toContainText('Robin');
	await expectAccessible(page);
	await page.getByRole('button', { name: 'Yes, we will come' }).click();
	await expect(page.getByText('You said you will come')).toBeVisible();
	await page.getByRole('link', { name: 'Answer the questions' }).click();
	const choose = (field: string, value: string) =>
		page.locator(`input[name=${field}][value=${value}]`).check();
	await choose('yellowArea', 'belly');
	await choose('yellowDepth', 'clear');
	await choose('yellowChange', 'more');
	await choose('eyesYellow', 'no');
	await page.locator('[name=feedsIn24Hours]').fill('9');
	await page.locator('[name=wetIn24Hours]').fill('4');
	await page.locator('[name=dirtyIn24Hours]').fill('3');
	await page.locator('[name=hoursSinceWet]').fill('2');
	await choose('stoolColour', 'yellow');
	await choose('urineColour', 'pale');
	await page.getByRole('button', { name: 'Send my answers' }).click();
	await expect(page.getByRole('alert')).toContainText('Please look at these answers');
	await expectAccessible(page);
	await expect(page.locator('[name=feedsIn24Hours]')).toHaveValue('9');
	for (const [field, value] of [
		['waking', 'wakes-for-feeds'],
		['suck', 'strong'],
		['cry', 'normal'],
		['tone', 'normal'],
		['breathing', 'normal'],
		['seizure', 'no'],
		['worried', 'yes']
	] as const) {
		await choose(field, value);
	}
	await page.getByRole('button', { name: 'Send my answers' }).click();
	await expect(page.getByRole('heading', { level: 1 })).toContainText('needs to be seen today');
	await expectAccessible(page);
}

async function deskReceives(page: Page): Promise<void> {
	await page.goto('/queue');
	await page
		.getByRole('link', { name: new RegExp(FAMILY) })
		.first()
		.click();
	await expect(page).toHaveURL(/\/queue\/[a-z0-9]{16}/);
	await page.locator('input[name=outcome][value=reached]').check();
	await page.locator('[name=note]').fill('Coming now.');
	await page.getByRole('button', { name: 'Write it down' }).click();
	await expect(page.getByText('Coming now.')).toBeVisible();
	await page.locator('input[name=how]').first().fill('Called: they are on their way.');
	await page
		.getByRole('button', { name: /settle/i })
		.first()
		.click();
	await page.getByRole('button', { name: 'Mark as arrived' }).first().click();
	await expect(page.getByText('Seen').first()).toBeVisible();
}

async function pediatricianCloses(page: Page): Promise<void> {
	await page.goto('/waiting');
	await page
		.getByRole('link', { name: new RegExp(FAMILY) })
		.first()
		.click();
	await expect(page).toHaveURL(/\/follow-ups\/[a-z0-9]{16}/);
	const value = page.locator('form[action="?/record"], form:has(input[name=total])').first();
	await value.locator('input[name=method][value=serum]').check();
	await value.getByLabel('Total').fill('9.1');
	await value.getByRole('button', { name: 'Now', exact: true }).click();
	await value.getByRole('button', { name: 'Save the value' }).click();
	await expect(page.getByText('The value is saved.')).toBeVisible();
	const decision = page.locator('form[action="?/decide"]');
	const otherwise = page.getByText('Decide otherwise').first();
	if (!(await decision.isVisible())) await otherwise.click();
	await decision.locator('input[name=then][value=close]').check();
	await decision.locator('[name=outcome]').selectOption('jaundice-settled');
	await decision.locator('[name=reason]').fill('Well below the line and falling, feeding well.');
	await decision.getByRole('button', { name: 'Decide this' }).click();
	await expect(page.getByText(/closed/i).first()).toBeVisible();
}

test('a newborn goes from the nurse through telephone, parent and desk to the pediatrician, and the loop closes', async ({
	browser,
	page
}) => {
	test.setTimeout(240_000);
	const zone = await demoZone();
	await test.step('the nurse enters the newborn, books and hands over', async () => {
		await nurseDischarges(await signedIn(browser, 'nurse@example.org'), zone);
	});
	const link = await test.step('the worker sends the confirmation', () => linkOnTelephone(page));
	await test.step('the parent’s page and its questions are light', async () => {
		await expectLight(browser, link);
		await expectLight(browser, `${link}/check-in`);
	});
	await test.step('the parent confirms and answers the check-in', () => parentAnswers(page, link));
	await test.step('the desk calls, settles and marks the arrival', async () => {
		await deskReceives(await signedIn(browser, 'desk@example.org'));
	});
	await test.step('the pediatrician enters the value and closes', async () => {
		await pediatricianCloses(await signedIn(browser, 'pediatrician@example.org'));
	});
	await test.step('nothing is owed any more, and the page tells the family', async () => {
		await page.goto(link);
		await expect(page.getByText('The follow-up is finished')).toBeVisible();
		const connection = await mysql.createConnection({ uri: databaseUrl() });
		const [rows] = await connection.query<mysql.RowDataPacket[]>(
			`select f.stage, f.next_step as nextStep, f.outcome from follow_ups f
			 join newborns n on n.id = f.newborn_id where n.record_number = ?`,
			[FAMILY]
		);
		await connection.end();
		expect(rows).toEqual([{ stage: 'closed', nextStep: null, outcome: 'jaundice-settled' }]);
	});
});
