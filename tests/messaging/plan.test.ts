import { beforeEach, describe, expect, it } from 'vitest';
import { DEFAULT_POLICY } from '../../src/lib/domain/followup/policy';
import { isExemptFromQuiet, isQuiet } from '../../src/lib/domain/messaging/quiet-hours';
import { cancelVisit, moveVisit } from '../../src/lib/server/services/visits';
import { fixedClock, testContext } from '../support/context';
import { openTestDatabase } from '../support/database';
import { book, local, makeFamily, messagesOf, replan, sendDue, ZONE } from './family';

describe('the plan in the database', async () => {
	const database = await openTestDatabase();
	beforeEach(() => database.clean());

	const kinds = (rows: readonly { kind: string; channel: string; state: string }[], state: string) =>
		rows
			.filter((row) => row.state === state)
			.map(({ kind, channel }) => `${kind} ${channel}`)
			.sort();

	it('adds what is new once, withdraws what no longer holds, and never sends again what was sent', async () => {
		const ctx = testContext(database, fixedClock(local('2026-03-03T10:00')));
		const family = await makeFamily(ctx);
		const { followUpId, desk } = family;
		await book(ctx, family, local('2026-03-05T09:00'));
		await replan(ctx, followUpId);
		const first = await messagesOf(ctx, followUpId);
		expect(kinds(first, 'planned')).toEqual([
			'check-in-ask sms',
			'reminder-day-before sms',
			'reminder-morning sms',
			'visit-booked mail',
			'visit-booked sms'
		]);
		expect(await sendDue(ctx, followUpId)).toHaveLength(2);

		const to = { startsAt: local('2026-03-05T08:30'), kind: 'check' as const, why: 'asked' };
		expect((await moveVisit(ctx, desk, { followUpId, ...to })).ok).toBe(true);
		const moved = await messagesOf(ctx, followUpId);
		expect(kinds(moved, 'withdrawn')).toEqual(['reminder-day-before sms', 'reminder-morning sms']);
		expect(kinds(moved, 'planned')).toContain('visit-moved sms');
		expect(kinds(moved, 'planned').filter((kind) => kind.startsWith('visit-booked'))).toEqual([]);
		expect((await sendDue(ctx, followUpId)).map(({ row }) => row.kind)).toEqual([
			'visit-moved',
			'visit-moved'
		]);

		expect((await cancelVisit(ctx, desk, { followUpId, why: 'closed' })).ok).toBe(true);
		const sent = await sendDue(ctx, followUpId);
		expect(sent.map(({ row }) => row.kind)).toEqual(['visit-cancelled', 'visit-cancelled']);
		await replan(ctx, followUpId);
		expect(await sendDue(ctx, followUpId)).toEqual([]);
	});

	it('checks again at the moment of sending', async () => {
		const clock = fixedClock(local('2026-03-03T10:00'));
		const ctx = testContext(database, clock);
		const family = await makeFamily(ctx);
		await book(ctx, family, local('2026-03-05T09:00'));
		await database.pool.query('update visits set state = ?, holds_place = null, is_open = null', [
			'cancelled'
		]);
		expect(await sendDue(ctx, family.followUpId)).toEqual([]);
		const rows = await messagesOf(ctx, family.followUpId);
		expect(kinds(rows, 'withdrawn')).toEqual(['visit-booked mail', 'visit-booked sms']);
	});

	it.each([
		// AAP 2022: stool and urine at two weeks, and the breastfed again at three (NASPGHAN 2017). NICE CG98: before
		// 37 weeks at three weeks, whatever the feeding.
		['aap-2022', 36, 'breast', ['2026-03-16', '2026-03-23']],
		['aap-2022', 36, 'formula', ['2026-03-16']],
		['nice-cg98', 36, 'breast', ['2026-03-23']],
		['nice-cg98', 37, 'breast', ['2026-03-16']]
	] as const)(
		'asks about lasting jaundice as %s says, born at %i weeks, fed by %s',
		async (standard, weeks, feeding, days) => {
			const ctx = testContext(database, fixedClock(local('2026-03-03T10:00')));
			const family = await makeFamily(ctx, {
				newborn: { bornAt: local('2026-03-02T04:00'), gestationWeeks: weeks, feeding },
				followUp: { standard, stage: 'later-check', nextStep: 'ask-again-later' }
			});
			await replan(ctx, family.followUpId);
			const asked = (await messagesOf(ctx, family.followUpId)).filter(
				({ kind }) => kind === 'prolonged-check-ask'
			);
			expect(asked.map(({ occasion }) => occasion).sort()).toEqual(days);
		}
	);

	it.each([
		['spring', '2026-03-07T00:00'],
		['autumn', '2026-10-31T00:00']
	])(
		'lets two days pass over the change of the clocks in %s: every message once, in its hours',
		async (_, start) => {
			const clock = fixedClock(local(start));
			const ctx = testContext(database, clock);
			const family = await makeFamily(ctx, {
				followUp: { windowUntilAt: new Date(local(start).getTime() + 72 * 3_600_000) }
			});
			const { followUpId } = family;
			await book(ctx, family, new Date(local(start).getTime() + 62 * 3_600_000));
			const sent: { key: string; kind: string; at: Date; priority: number }[] = [];
			for (let step = 0; step < 48 * 4; step++) {
				await replan(ctx, followUpId);
				for (const { row } of await sendDue(ctx, followUpId)) {
					sent.push({ key: row.dedupeKey, kind: row.kind, at: clock.now(), priority: row.priority });
				}
				clock.advance({ minutes: 15 });
			}
			expect(sent.map(({ kind }) => kind).sort()).toEqual([
				'check-in-ask',
				'reminder-day-before',
				'visit-booked',
				'visit-booked'
			]);
			expect(new Set(sent.map(({ key }) => key)).size).toBe(sent.length);
			const quiet = { timeZone: ZONE, ...DEFAULT_POLICY };
			for (const { at, priority, key } of sent) {
				expect(isQuiet(at, quiet) && !isExemptFromQuiet(priority), `${key} at ${at.toISOString()}`).toBe(
					false
				);
			}
		}
	);
});
