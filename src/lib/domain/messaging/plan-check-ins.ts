import { DateTime } from 'luxon';
import { addressed, firstReachable } from './plan-carers';
import {
	type PlanCarer,
	type PlanCheckIn,
	type PlanFacts,
	type PlannedMessage,
	PRIORITY
} from './plan-facts';
import { ASKING_STAGES } from './plan-stages';
import { lastAllowedBefore, nextAllowed, type QuietHours } from './quiet-hours';

const HOUR = 3_600_000;
/** Local time of the morning question; common practice, no source. */
const ASK_HOUR = 9;
/** Without a visit to end them, the daily questions end after a week; the ladder has long taken over. */
const DAILY_DAYS = 7;
/** On the day of the visit the question must leave time for an answer to matter. */
const BEFORE_VISIT_HOURS = 3;

/** The daily questions until the visit, those of the prolonged-jaundice rule, and the answers received. */
export function planCheckIns(facts: PlanFacts): PlannedMessage[] {
	const carer = firstReachable(facts.carers);
	if (carer === undefined) return [];
	return [...daily(facts, carer), ...prolonged(facts, carer), ...received(facts, carer)];
}

const localDay = (at: Date, timeZone: string): DateTime =>
	DateTime.fromJSDate(at, { zone: timeZone }).startOf('day');

const quietOf = (facts: PlanFacts): QuietHours => ({ timeZone: facts.timeZone, ...facts.policy });

function daily(facts: PlanFacts, carer: PlanCarer): PlannedMessage[] {
	if (!ASKING_STAGES.includes(facts.stage)) return [];
	const open = facts.visits.find(({ state }) => state === 'booked' || state === 'confirmed');
	const first = localDay(facts.dischargedAt, facts.timeZone).plus({ days: 1 });
	const last = open ? localDay(open.startsAt, facts.timeZone) : first.plus({ days: DAILY_DAYS - 1 });
	const asks: PlannedMessage[] = [];
	for (let day = first; day <= last && asks.length < 14; day = day.plus({ days: 1 })) {
		asks.push(...askOn(facts, carer, day, open?.startsAt));
	}
	return asks;
}

/** None on a day that is quiet altogether, or on which the family has already told us. */
function askOn(
	facts: PlanFacts,
	carer: PlanCarer,
	day: DateTime,
	visitAt: Date | undefined
): PlannedMessage[] {
	const quiet = quietOf(facts);
	const runAt = nextAllowed(day.set({ hour: ASK_HOUR }).toJSDate(), quiet);
	if (!localDay(runAt, facts.timeZone).equals(day)) return [];
	if (visitAt && runAt.getTime() > visitAt.getTime() - BEFORE_VISIT_HOURS * HOUR) return [];
	if (answeredOn(facts.checkIns, day, facts.timeZone, runAt)) return [];
	const evening = lastAllowedBefore(day.set({ hour: 20 }).toJSDate(), quiet);
	return addressed(facts.followUpId, carer, 'preferred', {
		kind: 'check-in-ask',
		occasion: day.toFormat('yyyy-MM-dd'),
		priority: PRIORITY.ordinary,
		runAt,
		expiresAt: visitAt && visitAt < evening ? visitAt : evening,
		facts: {}
	});
}

function answeredOn(
	checkIns: readonly PlanCheckIn[],
	day: DateTime,
	timeZone: string,
	before: Date
): boolean {
	return checkIns.some(({ answeredAt }) => answeredAt < before && localDay(answeredAt, timeZone).equals(day));
}

function prolonged(facts: PlanFacts, carer: PlanCarer): PlannedMessage[] {
	if (facts.stage !== 'later-check') return [];
	const born = localDay(facts.bornAt, facts.timeZone);
	const days = facts.prolongedCheckDays.map((days) => born.plus({ days }));
	if (facts.laterCheckAt) days.push(localDay(facts.laterCheckAt, facts.timeZone));
	const byDate = new Map(days.map((day) => [day.toFormat('yyyy-MM-dd'), day]));
	return [...byDate].flatMap(([date, day]) => {
		const quiet = quietOf(facts);
		const runAt = nextAllowed(day.set({ hour: ASK_HOUR }).toJSDate(), quiet);
		return addressed(facts.followUpId, carer, 'preferred', {
			kind: 'prolonged-check-ask',
			occasion: date,
			priority: PRIORITY.ordinary,
			runAt,
			expiresAt: new Date(runAt.getTime() + 36 * HOUR),
			facts: {}
		});
	});
}

/** What we got and what follows from it, to the carer who answered. */
function received(facts: PlanFacts, first: PlanCarer): PlannedMessage[] {
	return facts.checkIns.flatMap((checkIn) => {
		const asked = facts.carers.find(({ id }) => id === checkIn.carerId);
		const carer = asked && (asked.canSms || asked.canMail) ? asked : first;
		return addressed(facts.followUpId, carer, 'preferred', {
			kind: 'answer-received',
			occasion: checkIn.id,
			priority: checkIn.result === 'emergency' ? PRIORITY.urgent : PRIORITY.answer,
			runAt: checkIn.answeredAt,
			expiresAt: new Date(checkIn.answeredAt.getTime() + 2 * HOUR),
			facts: { checkInId: checkIn.id, result: checkIn.result }
		});
	});
}
