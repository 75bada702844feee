import { gzipSync } from 'node:zlib';
import { expect, type Browser } from '@playwright/test';

const KILOBYTE = 1000;
/** The first round trip of a poor connection (RFC 6928: ten segments of about 1,460 bytes). */
const MOST_PAGE_BYTES = 14 * KILOBYTE;

/**
 * What a parent's telephone has to fetch before it can show the page: HTML and styles as a proxy compresses them, no
 * script, nothing from elsewhere.
 */
export async function expectLight(browser: Browser, link: string): Promise<void> {
	const context = await browser.newContext();
	const page = await context.newPage();
	const bodies: { kind: string; url: string; bytes: number }[] = [];
	const reading: Promise<void>[] = [];
	page.on('response', (response) => {
		reading.push(
			(async () => {
				const kind = response.request().resourceType();
				const body = await response.body();
				bodies.push({ kind, url: response.url(), bytes: gzipSync(body).length });
			})()
		);
	});
	await page.goto(link, { waitUntil: 'networkidle' });
	await Promise.all(reading);
	await context.close();
	const { origin } = new URL(link);
	expect(bodies.filter(({ url }) => new URL(url).origin !== origin)).toEqual([]);
	expect(bodies.filter(({ kind }) => kind === 'script')).toEqual([]);
	const blocking = bodies.filter(({ kind }) => kind === 'document' || kind === 'stylesheet');
	const total = blocking.reduce((sum, { bytes }) => sum + bytes, 0);
	expect(total, JSON.stringify(blocking)).toBeGreaterThan(0);
	expect(total, JSON.stringify(blocking)).toBeLessThanOrEqual(MOST_PAGE_BYTES);
}
