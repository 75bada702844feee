import { beforeEach, describe, expect, it } from 'vitest';
import { acceptInvitation } from '../../src/lib/server/auth/invitation';
import { messageTemplates } from '../../src/lib/server/db/schema/messaging';
import { organisations } from '../../src/lib/server/db/schema/organisation';
import { foundOrganisation } from '../../src/lib/server/services/founding';
import { testContext } from '../support/context';
import { openTestDatabase } from '../support/database';

const database = await openTestDatabase();
beforeEach(database.clean);

const FOUNDING = {
	organisationName: 'New Organisation',
	standard: 'aap-2022',
	emergencyNumber: '911',
	administratorName: 'First Person',
	administratorEmail: 'First@Example.org'
} as const;

describe('founding an organisation', () => {
	it('gives it wording and an administrator who can set a password once', async () => {
		const ctx = testContext(database);
		const founded = await foundOrganisation(ctx, FOUNDING);
		const token = (founded.ok && founded.value.link.split('/').at(-1)) || '';
		const password = 'a long enough password';
		expect(await acceptInvitation(ctx, { token, password, oldSessionId: null })).toMatchObject({ ok: true });
		expect(await acceptInvitation(ctx, { token, password, oldSessionId: null })).toMatchObject({ ok: false });
		expect((await ctx.db.select().from(messageTemplates)).length).toBeGreaterThan(50);
	});

	it('leaves nothing behind where the address has an account', async () => {
		const ctx = testContext(database);
		await foundOrganisation(ctx, FOUNDING);
		expect(await foundOrganisation(ctx, FOUNDING)).toMatchObject({ ok: false, error: { code: 'invalid' } });
		expect(await ctx.db.select().from(organisations)).toHaveLength(1);
	});
});
