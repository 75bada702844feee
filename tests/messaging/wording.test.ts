import { beforeEach, describe, expect, it } from 'vitest';
import { withTx } from '../../src/lib/server/db/tx';
import {
	getWording,
	installDefaultWording,
	listWording,
	markReviewed,
	restoreWording,
	saveWording
} from '../../src/lib/server/services/wording';
import { fixedClock, testContext } from '../support/context';
import { openTestDatabase } from '../support/database';
import { book, local, makeFamily, sendDue } from './family';

describe('wording', async () => {
	const database = await openTestDatabase();
	beforeEach(() => database.clean());
	const place = { kind: 'visit-booked', channel: 'sms', language: 'en' } as const;

	it('is installed once and changed only by an administrator, as a new draft', async () => {
		const ctx = testContext(database, fixedClock(local('2026-03-03T10:00')));
		const family = await makeFamily(ctx);
		const admin = family.hospital.admin.actor;
		await withTx(ctx.db, (tx) => installDefaultWording(tx, ctx, family.organisationId));
		const heads = await listWording(ctx, admin);
		expect(
			heads.ok && heads.value.every(({ standing, version }) => standing === 'draft' && version === 1)
		).toBe(true);
		expect((await listWording(ctx, family.desk)).ok).toBe(false);

		const body = 'Come {day} at {time} to {clinic}. {link}';
		const change = { ...place, subject: null, body, basedOn: 1 };
		expect((await saveWording(ctx, family.desk, change)).ok).toBe(false);
		for (const wrong of ['Come {day} to {clinic}. {link}', `${body} {surname}`, `${body} {`]) {
			const refused = await saveWording(ctx, admin, { ...change, body: wrong });
			expect(refused).toMatchObject({ ok: false, error: { code: 'invalid', field: 'body' } });
		}
		expect(await saveWording(ctx, admin, change)).toEqual({ ok: true, value: { version: 2 } });
		expect(await saveWording(ctx, admin, { ...change, body: `${body}!` })).toMatchObject({
			ok: false,
			error: { code: 'conflict' }
		});

		await book(ctx, family, local('2026-03-05T09:00'));
		const sent = await sendDue(ctx, family.followUpId);
		const text = sent.find(({ row }) => row.channel === 'sms')?.result.text ?? '';
		expect(text).toMatch(/^Come Thursday, Mar 5 at 9:00 AM to East clinic\. http\S+ \([a-z2-7]{6}\)$/);
	});

	it('keeps every version and its review', async () => {
		const ctx = testContext(database, fixedClock(local('2026-03-03T10:00')));
		const admin = (await makeFamily(ctx)).hospital.admin.actor;
		expect((await markReviewed(ctx, admin, { ...place, version: 1, reviewedBy: 'A. Reader' })).ok).toBe(true);
		await saveWording(ctx, admin, {
			...place,
			subject: null,
			body: '{clinic} {day} {time} {link}',
			basedOn: 1
		});
		expect(await markReviewed(ctx, admin, { ...place, version: 1, reviewedBy: null })).toMatchObject({
			ok: false
		});
		expect(await restoreWording(ctx, admin, { ...place, version: 1 })).toEqual({
			ok: true,
			value: { version: 3 }
		});
		const versions = await getWording(ctx, admin, place);
		expect(
			versions.ok && versions.value.map(({ version, standing, isCurrent }) => [version, standing, isCurrent])
		).toEqual([
			[3, 'reviewed', true],
			[2, 'draft', null],
			[1, 'reviewed', null]
		]);
	});
});
