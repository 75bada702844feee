import type { Page } from '@playwright/test';

const HOUR = 3_600_000;

/** Date and time boxes of an instant, read off the page's own "Now" so that the unit's zone is the page's to know. */
export async function fillHoursAgo(
	page: Page,
	ids: { on: string; time: string },
	hoursAgo: number
): Promise<void> {
	const zone = await page.evaluate(
		() => document.querySelector<HTMLInputElement>('[name=timeZone]')?.value ?? ''
	);
	const at = new Date(Date.now() - hoursAgo * HOUR);
	const [on, time] = new Intl.DateTimeFormat('sv-SE', {
		timeZone: zone,
		year: 'numeric',
		month: '2-digit',
		day: '2-digit',
		hour: '2-digit',
		minute: '2-digit'
	})
		.format(at)
		.split(' ');
	await page.locator(`[id="${ids.on}"]`).fill(on ?? '');
	await page.locator(`[id="${ids.time}"]`).fill(time ?? '');
}

/** All that a new discharge asks for, of one newborn of 40 hours well below the line. */
export async function fillNewborn(page: Page, recordNumber: string): Promise<void> {
	await page.getByLabel('Family name').fill('Aldana');
	await page.getByLabel('Given name').fill('Inés');
	await page.getByLabel('Record number', { exact: true }).fill(recordNumber);
	await page.getByLabel('Birth weight').fill('3,240');
	await fillHoursAgo(page, { on: 'bornOn', time: 'bornTime' }, 40);
	await page.getByLabel('completed weeks').fill('39');
	await page.getByLabel('days beyond the weeks').fill('2');
	await page.locator('[id="measurementMethod[0]"]').selectOption({ label: 'TSB' });
	await page.locator('[id="measurementTotal[0]"]').fill('9,4');
	await fillHoursAgo(page, { on: 'measurementOn[0]', time: 'measurementTime[0]' }, 3);
	await page.getByRole('radio', { name: 'Breast' }).check();
	await page.getByLabel('Name', { exact: true }).first().fill('Lucía Aldana');
	await page.getByLabel('Telephone', { exact: true }).first().fill('202 555 0177');
	await page.getByLabel('Language').first().selectOption({ label: 'Español' });
	await page.getByLabel('Agreed to text messages').first().check();
	await fillHoursAgo(page, { on: 'dischargeOn', time: 'dischargeTime' }, -1);
	await page.getByLabel('Clinic', { exact: true }).selectOption({ index: 1 });
}
