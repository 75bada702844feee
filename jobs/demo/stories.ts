import type { CheckInAnswers } from '../../src/lib/domain/guideline/types';
import { logAttempt } from '../../src/lib/server/services/attempts';
import { answerCheckIn } from '../../src/lib/server/services/check-ins';
import { enterDischarge, handOver } from '../../src/lib/server/services/discharges';
import { recordMeasurement } from '../../src/lib/server/services/measurements';
import {
	askForAnotherTime,
	confirmVisit,
	markArrived,
	markMissed
} from '../../src/lib/server/services/visits';
import { findFollowUp } from '../../src/lib/server/repos/follow-ups';
import { findNewbornRecord } from '../../src/lib/server/repos/newborns';
import { clinicIdOf, freePlaces, hoursFrom, must, staffOf, type Demo } from './context';
import { dischargeFacts, measurementOf, type DemoNewborn, type DemoValue } from './newborns';

/** One newborn under way: the steps below are what each person does, at the time the demo's clock shows. */
export interface Underway {
	readonly newborn: DemoNewborn;
	readonly followUpId: string;
	readonly bornAt: Date;
	readonly dischargeAt: Date;
}

/** The nurse enters a newborn two hours before the planned discharge, or now where that lies ahead. */
export async function enter(demo: Demo, newborn: DemoNewborn, dischargeAt: Date): Promise<Underway> {
	const until = new Date(Math.min(hoursFrom(dischargeAt, -1).getTime(), demo.now.getTime()));
	demo.clock.set(until);
	const facts = dischargeFacts(demo, newborn, { dischargeAt, until });
	const entered = must(
		await enterDischarge(demo.ctx, demo.nurse, { birthSiteId: demo.unit.id, facts }),
		`enter ${newborn.family}`
	);
	return { newborn, followUpId: entered.followUpId, bornAt: facts.bornAt, dischargeAt };
}

async function windowOf(demo: Demo, followUpId: string) {
	const loaded = await findFollowUp(demo.ctx.db, followUpId);
	const discharge = loaded?.row.plannedDischargeAt ?? demo.now;
	return loaded?.state.window ?? { from: discharge, until: hoursFrom(discharge, 72) };
}

/** A free place inside the newborn's window between two instants: the last one, or the first one. */
export async function placeInWindow(
	demo: Demo,
	under: Underway,
	asked: { from: Date; until: Date; take: 'first' | 'last' }
) {
	const window = await windowOf(demo, under.followUpId);
	const from = new Date(Math.max(window.from.getTime(), asked.from.getTime()));
	const until = new Date(Math.min(window.until.getTime(), asked.until.getTime()));
	if (until < from) return null;
	const clinicId = await clinicIdOf(demo, under.followUpId);
	const places = await freePlaces(demo, { clinicId, from, until });
	return (asked.take === 'first' ? places[0] : places.at(-1)) ?? null;
}

/** The nurse books (where a place is given) and hands over. */
export async function leave(demo: Demo, under: Underway, startsAt: Date | null): Promise<void> {
	demo.clock.set(new Date(Math.min(under.dischargeAt.getTime(), demo.now.getTime())));
	const place = startsAt ? { startsAt, kind: 'check' as const } : null;
	must(
		await handOver(demo.ctx, demo.nurse, { followUpId: under.followUpId, place }),
		`hand over ${under.newborn.family}`
	);
}

/** A newborn that went home with a visit still ahead; false where the clinic has no place in the window. */
export async function homeWithVisit(demo: Demo, newborn: DemoNewborn, hoursAgo: number): Promise<Underway> {
	const under = await enter(demo, newborn, hoursFrom(demo.now, -hoursAgo));
	const place = await placeInWindow(demo, under, {
		from: hoursFrom(demo.now, 0.5),
		until: hoursFrom(demo.now, 96),
		// Who left this morning comes late in the window, who left earlier is next: a calendar with both.
		take: hoursAgo < 6 ? 'last' : 'first'
	});
	await leave(demo, under, place?.startsAt ?? null);
	return under;
}

/** A newborn whose visit has begun at least an hour ago; the discharge goes back in time until the calendar has one. */
export async function homeWithPastVisit(
	demo: Demo,
	newborn: DemoNewborn,
	hoursAgo: number
): Promise<Underway & { visitAt: Date }> {
	for (let back = hoursAgo; back <= hoursAgo + 24 * 8; back += 2) {
		const dischargeAt = hoursFrom(demo.now, -back);
		const clinicId = demo.clinics[newborn.clinic ?? 0].id;
		const places = await freePlaces(demo, {
			clinicId,
			from: hoursFrom(dischargeAt, 5),
			until: hoursFrom(dischargeAt, 16)
		});
		const lastPast = places.filter((place) => place.startsAt <= hoursFrom(demo.now, -1)).at(-1);
		if (!lastPast) continue;
		const under = await enter(demo, newborn, dischargeAt);
		const place = await placeInWindow(demo, under, {
			from: dischargeAt,
			until: hoursFrom(demo.now, -1),
			take: 'last'
		});
		if (!place) throw new Error(`Demo: no past place for ${newborn.family}.`);
		await leave(demo, under, place.startsAt);
		return { ...under, visitAt: place.startsAt };
	}
	throw new Error(`Demo: the calendar has no past place for ${newborn.family}.`);
}

async function carerActor(demo: Demo, followUpId: string) {
	const loaded = await findFollowUp(demo.ctx.db, followUpId);
	const record = loaded && (await findNewbornRecord(demo.ctx.db, loaded.row.newbornId));
	const carerId = record?.carers[0]?.id;
	if (!carerId) throw new Error('Demo: no carer.');
	return { kind: 'carer' as const, carerId, followUpId };
}

export async function parentConfirms(demo: Demo, under: Underway, at: Date): Promise<void> {
	demo.clock.set(at);
	const actor = await carerActor(demo, under.followUpId);
	must(await confirmVisit(demo.ctx, actor, { followUpId: under.followUpId, via: 'link' }), 'confirm');
}

export async function parentAsksOtherTime(
	demo: Demo,
	under: Underway,
	asked: { at: Date; wish: string }
): Promise<void> {
	demo.clock.set(asked.at);
	const actor = await carerActor(demo, under.followUpId);
	must(
		await askForAnotherTime(demo.ctx, actor, { followUpId: under.followUpId, wish: asked.wish }),
		'other time'
	);
}

const WELL: CheckInAnswers = {
	yellowArea: 'face',
	yellowChange: 'same',
	yellowDepth: 'pale',
	eyesYellow: 'no',
	feedsIn24Hours: 10,
	wetIn24Hours: 6,
	dirtyIn24Hours: 4,
	hoursSinceWet: 2,
	stoolColour: 'yellow',
	urineColour: 'pale',
	waking: 'wakes-for-feeds',
	suck: 'strong',
	cry: 'normal',
	tone: 'normal',
	breathing: 'normal',
	seizure: false,
	worried: false
};

export async function parentChecksIn(
	demo: Demo,
	under: Underway,
	asked: { at: Date; answers?: Partial<CheckInAnswers> }
): Promise<void> {
	demo.clock.set(asked.at);
	const actor = await carerActor(demo, under.followUpId);
	const answers = { ...WELL, ...asked.answers };
	must(await answerCheckIn(demo.ctx, actor, { answers, submissionKey: demo.ctx.random.id() }), 'check-in');
}

export async function deskMarks(
	demo: Demo,
	under: Underway,
	asked: { at: Date; as: 'arrived' | 'missed' }
): Promise<void> {
	demo.clock.set(asked.at);
	const actor = staffOf(demo.desk, await clinicIdOf(demo, under.followUpId));
	const mark = asked.as === 'arrived' ? markArrived : markMissed;
	must(await mark(demo.ctx, actor, { followUpId: under.followUpId }), asked.as);
}

export async function deskCalls(
	demo: Demo,
	under: Underway,
	asked: { at: Date; outcome: 'reached' | 'no-answer' | 'left-voicemail'; note: string }
): Promise<void> {
	demo.clock.set(asked.at);
	const actor = staffOf(demo.desk, await clinicIdOf(demo, under.followUpId));
	const { carerId } = await carerActor(demo, under.followUpId);
	const { outcome, note } = asked;
	must(
		await logAttempt(demo.ctx, actor, {
			followUpId: under.followUpId,
			carerId,
			channel: 'call',
			outcome,
			note
		}),
		'call'
	);
}

/** The pediatrician records a value measured at the given instant, so far below the line. */
export async function pediatricianMeasures(
	demo: Demo,
	under: Underway,
	asked: { at: Date; value: Omit<DemoValue, 'hour'> }
): Promise<void> {
	demo.clock.set(hoursFrom(asked.at, 0.2));
	const actor = staffOf(demo.pediatrician, await clinicIdOf(demo, under.followUpId));
	const hour = (asked.at.getTime() - under.bornAt.getTime()) / 3_600_000;
	const measurement = measurementOf(under.newborn, under.bornAt, { ...asked.value, hour });
	must(await recordMeasurement(demo.ctx, actor, { followUpId: under.followUpId, measurement }), 'value');
}
