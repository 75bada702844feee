import { DateTime } from 'luxon';
import { describe, expect, it } from 'vitest';
import { DEFAULT_POLICY } from '../followup/policy';
import { planMessages } from './plan';
import type { PlanCarer, PlanFacts, PlannedMessage, PlanVisit } from './plan-facts';
import { isExemptFromQuiet, isQuiet } from './quiet-hours';

const ZONE = 'America/Chicago';
const at = (iso: string): Date => DateTime.fromISO(iso, { zone: ZONE }).toJSDate();
const shown = (date: Date): string => DateTime.fromJSDate(date, { zone: ZONE }).toFormat('MM-dd HH:mm');

const mother: PlanCarer = { id: 'mother', callOrder: 1, language: 'es', canSms: true, canMail: true };
const father: PlanCarer = { id: 'father', callOrder: 2, language: 'en', canSms: true, canMail: false };

const visit: PlanVisit = {
	id: 'visit1',
	state: 'booked',
	startsAt: at('2026-03-05T10:20'),
	bookedAt: at('2026-03-02T14:00'),
	endedAt: null,
	otherTimeAskedAt: null,
	calendarUid: 'uid1',
	isTold: false
};

const facts: PlanFacts = {
	followUpId: 'followup1',
	stage: 'booked',
	outcome: null,
	closedAt: null,
	bornAt: at('2026-03-01T03:00'),
	prolongedCheckDays: [14, 21],
	dischargedAt: at('2026-03-02T15:00'),
	windowFromAt: at('2026-03-04T00:00'),
	windowUntilAt: at('2026-03-06T00:00'),
	laterCheckAt: null,
	lastReachedAt: null,
	timeZone: ZONE,
	policy: DEFAULT_POLICY,
	carers: [father, mother],
	visits: [visit],
	checkIns: []
};
const NOW = at('2026-03-02T14:00');

const lines = (plan: readonly PlannedMessage[]): string[] =>
	plan.map((m) => `${shown(m.runAt)} ${m.kind} ${m.carerId} ${m.channel}`).sort();
const ofKind = (plan: readonly PlannedMessage[], kind: string) =>
	plan.filter((message) => message.kind === kind);
const plan = (changes: Partial<PlanFacts>, now = NOW) => planMessages({ ...facts, ...changes }, now);

describe('the plan of messages', () => {
	it('goes to the first carer: booking by both channels, reminders and questions by text', () => {
		expect(lines(planMessages(facts, NOW))).toEqual([
			'03-02 14:00 visit-booked mother mail',
			'03-02 14:00 visit-booked mother sms',
			'03-03 09:00 check-in-ask mother sms',
			'03-04 09:00 check-in-ask mother sms',
			'03-04 10:00 reminder-day-before mother sms',
			'03-05 08:00 reminder-morning mother sms'
		]);
	});

	it('is the same whenever it is asked for, so that nothing is planned twice', () => {
		const keys = planMessages(facts, NOW).map(({ dedupeKey }) => dedupeKey);
		const later = planMessages(facts, at('2026-03-04T12:00')).map(({ dedupeKey }) => dedupeKey);
		expect(new Set(keys).size).toBe(keys.length);
		expect(keys).toEqual(expect.arrayContaining(later));
		expect(keys.every((key) => key.length <= 160)).toBe(true);
	});

	it('leaves out what is too late', () => {
		expect(planMessages(facts, at('2026-03-06T09:00'))).toEqual([]);
	});

	it('follows consent: mail only, the second carer only, nobody', () => {
		const noSms = { ...mother, canSms: false };
		expect(new Set(plan({ carers: [noSms, father] }).map(({ channel }) => channel))).toEqual(
			new Set(['mail'])
		);
		const silent = { ...mother, canSms: false, canMail: false };
		expect(new Set(plan({ carers: [silent, father] }).map(({ carerId }) => carerId))).toEqual(
			new Set(['father'])
		);
		expect(plan({ carers: [silent] })).toEqual([]);
	});

	it('waits for the morning when a visit is booked in the evening, but not when the visit is at eight', () => {
		const evening = { ...visit, bookedAt: at('2026-03-04T22:00') };
		expect(ofKind(plan({ visits: [evening] }), 'visit-booked').map(({ runAt }) => shown(runAt))).toEqual([
			'03-05 08:00',
			'03-05 08:00'
		]);
		const early = { ...evening, startsAt: at('2026-03-05T08:30') };
		const [urgent] = ofKind(plan({ visits: [early] }), 'visit-booked');
		expect(urgent).toMatchObject({ priority: 0, runAt: evening.bookedAt });
	});

	it('does not remind of a visit that was booked a moment before', () => {
		const sameDay = { ...visit, bookedAt: at('2026-03-05T07:00') };
		expect(ofKind(plan({ visits: [sameDay] }), 'reminder-day-before')).toEqual([]);
		expect(ofKind(plan({ visits: [sameDay] }), 'reminder-morning')).toEqual([]);
	});

	it('reminds on Saturday of a visit on Monday where Sunday is quiet', () => {
		const monday = { ...visit, startsAt: at('2026-03-09T10:00') };
		const policy = { ...DEFAULT_POLICY, quietDays: [7] };
		const [reminder] = ofKind(plan({ visits: [monday], policy }), 'reminder-day-before');
		expect(reminder && shown(reminder.runAt)).toBe('03-07 20:30');
	});

	it('says "moved" only to a family that knew of the earlier time', () => {
		const old = { ...visit, state: 'moved' as const, endedAt: at('2026-03-02T15:00') };
		const moved = {
			...visit,
			id: 'visit2',
			startsAt: at('2026-03-05T14:00'),
			bookedAt: at('2026-03-02T15:00')
		};
		expect(ofKind(plan({ visits: [old, moved] }), 'visit-moved')).toEqual([]);
		const told = plan({ visits: [{ ...old, isTold: true }, moved] });
		expect(ofKind(told, 'visit-moved')).toHaveLength(2);
		expect(ofKind(told, 'visit-booked')).toEqual([]);
		expect(ofKind(told, 'reminder-day-before').map(({ occasion }) => occasion)).toEqual(['visit2']);
	});

	it('says "cancelled" only of a visit that the family knew of, and not where another one stands', () => {
		const gone = { ...visit, state: 'cancelled' as const, endedAt: at('2026-03-03T11:00') };
		const at12 = at('2026-03-03T12:00');
		expect(ofKind(plan({ stage: 'to-book', visits: [gone] }, at12), 'visit-cancelled')).toEqual([]);
		const told = { ...gone, isTold: true };
		expect(ofKind(plan({ stage: 'to-book', visits: [told] }, at12), 'visit-cancelled')).toHaveLength(2);
		const other = { ...visit, id: 'visit2', calendarUid: 'uid2' };
		expect(ofKind(plan({ visits: [told, other] }, at12), 'visit-cancelled')).toEqual([]);
	});

	it('asks each morning until the visit, but not on a day that was answered, nor right before the visit', () => {
		const answered = {
			id: 'c1',
			carerId: 'father',
			result: 'today' as const,
			answeredAt: at('2026-03-03T07:00')
		};
		const asked = plan({ checkIns: [answered] }, at('2026-03-03T07:01'));
		expect(ofKind(asked, 'check-in-ask').map(({ occasion }) => occasion)).toEqual(['2026-03-04']);
		const afternoon = { ...visit, startsAt: at('2026-03-05T15:00') };
		expect(ofKind(plan({ visits: [afternoon] }), 'check-in-ask').map(({ occasion }) => occasion)).toEqual([
			'2026-03-03',
			'2026-03-04',
			'2026-03-05'
		]);
	});

	it('answers the carer who answered, at once and whatever the hour', () => {
		const answered = {
			id: 'c1',
			carerId: 'father',
			result: 'emergency' as const,
			answeredAt: at('2026-03-03T02:00')
		};
		const [answer] = ofKind(plan({ checkIns: [answered] }, at('2026-03-03T02:00')), 'answer-received');
		expect(answer).toMatchObject({
			carerId: 'father',
			language: 'en',
			priority: 0,
			runAt: answered.answeredAt
		});
		expect(answer?.facts.result).toBe('emergency');
	});

	it('climbs the ladder: the first carer at once, then the second and mail, unless the family was reached', () => {
		const missed = { ...visit, state: 'missed' as const, endedAt: at('2026-03-05T10:50') };
		const noShow = { stage: 'missed' as const, visits: [missed] };
		const now = at('2026-03-05T10:50');
		expect(lines(plan(noShow, now)).filter((line) => line.includes('missed'))).toEqual([
			'03-05 10:50 visit-missed mother sms',
			'03-05 12:20 visit-missed-again father sms',
			'03-05 12:20 visit-missed-again mother mail'
		]);
		const reached = plan({ ...noShow, lastReachedAt: at('2026-03-05T11:00') }, now);
		expect(ofKind(reached, 'visit-missed-again')).toEqual([]);
		expect(ofKind(plan({ visits: [missed], stage: 'booked' }, now), 'visit-missed')).toEqual([]);
	});

	it('asks again at the ages of the prolonged-jaundice rule and on the day that was set', () => {
		const later = { stage: 'later-check' as const, visits: [], laterCheckAt: at('2026-03-18T12:00') };
		expect(lines(plan(later))).toEqual([
			'03-15 09:00 prolonged-check-ask mother sms',
			'03-18 09:00 prolonged-check-ask mother sms',
			'03-22 09:00 prolonged-check-ask mother sms'
		]);
		const formula = plan({ ...later, prolongedCheckDays: [14], laterCheckAt: null });
		expect(lines(formula)).toEqual(['03-15 09:00 prolonged-check-ask mother sms']);
	});

	it('is silent after a death, a double entry and a family that was not reached', () => {
		const closed = { stage: 'closed' as const, closedAt: NOW, visits: [] };
		for (const outcome of ['died', 'entered-twice', 'not-reached'] as const) {
			expect(plan({ ...closed, outcome })).toEqual([]);
		}
		expect(lines(plan({ ...closed, outcome: 'jaundice-settled' }))).toEqual([
			'03-02 15:00 follow-up-closed mother sms'
		]);
	});

	it.each([
		['spring', '2026-03-06T00:00'],
		['autumn', '2026-10-30T00:00']
	])('keeps to the allowed hours when the clocks change in %s, whenever the visit is booked', (_, start) => {
		for (let hour = 0; hour < 72; hour++) {
			const bookedAt = new Date(at(start).getTime() + hour * 3_600_000);
			for (const ahead of [5, 17, 30, 44]) {
				const startsAt = new Date(bookedAt.getTime() + ahead * 3_600_000);
				const checked = plan(
					{ visits: [{ ...visit, bookedAt, startsAt }], dischargedAt: bookedAt },
					bookedAt
				);
				const loud = checked.filter(({ priority }) => !isExemptFromQuiet(priority));
				for (const { runAt, kind } of loud) {
					expect(
						isQuiet(runAt, { timeZone: ZONE, ...DEFAULT_POLICY }),
						`${kind} ${runAt.toISOString()}`
					).toBe(false);
				}
			}
		}
	});
});
