import { beforeEach, describe, expect, it } from 'vitest';
import { enterDischarge } from '../../src/lib/server/services/discharges';
import { startDischarge } from '../../src/lib/server/services/discharge-view';
import { openTestDatabase } from '../support/database';
import { makeDischargeFacts } from '../support/factories/discharge';
import { must, openWorld } from '../support/follow-up-world';

const database = await openTestDatabase();
beforeEach(database.clean);

describe('who enters a newborn, and where', () => {
	it('a nurse at her own unit, for any clinic', async () => {
		const { ctx, hospital, east } = await openWorld(database);
		const setting = must(await startDischarge(ctx, east.nurse.actor, { unitId: hospital.west.birthSiteId }));
		expect(setting.units.map(({ id }) => id)).toEqual([east.birthSiteId]);
		expect(setting.unit.id).toBe(east.birthSiteId);
		expect(setting.clinics.map(({ id }) => id).sort()).toEqual(
			[east.clinicId, hospital.west.clinicId].sort()
		);
	});

	it('a pediatrician at her own clinic, born at any unit', async () => {
		const { ctx, clock, hospital, east } = await openWorld(database);
		const { actor } = east.pediatrician;
		const setting = must(await startDischarge(ctx, actor, { unitId: hospital.west.birthSiteId }));
		expect(setting.unit.id).toBe(hospital.west.birthSiteId);
		expect(setting.units).toHaveLength(2);
		expect(setting.clinics.map(({ id }) => id)).toEqual([east.clinicId]);

		const birthSiteId = hospital.west.birthSiteId;
		const facts = makeDischargeFacts(clock.now(), { clinicId: east.clinicId });
		must(await enterDischarge(ctx, actor, { birthSiteId, facts }));
		const elsewhere = makeDischargeFacts(clock.now(), { clinicId: hospital.west.clinicId });
		expect(await enterDischarge(ctx, actor, { birthSiteId, facts: elsewhere })).toEqual({
			ok: false,
			error: { code: 'not_allowed' }
		});
	});

	it('nobody else', async () => {
		const { ctx, hospital, east } = await openWorld(database);
		for (const { actor } of [east.desk, hospital.admin]) {
			expect(await startDischarge(ctx, actor)).toEqual({ ok: false, error: { code: 'not_allowed' } });
		}
	});
});
