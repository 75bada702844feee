import type { FollowUpWindow } from '../guideline/types';
import type { Role } from '../access/roles';
import type { SitePolicy } from './policy';
import type { FollowUpState, NextStep } from './state';
import { NEXT_STEP_OF, type OpenStage } from './states';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;

export interface DueContext {
	readonly now: Date;
	readonly policy: SitePolicy;
	/** A value at or over a treatment threshold, or an answer that cannot wait. */
	readonly isUrgent?: boolean;
}

interface Owed {
	readonly role: Role;
	readonly siteId: string;
	readonly dueAt: Date;
}

type Subject = Omit<FollowUpState, 'nextStep' | 'stage'>;

const after = (instant: Date, milliseconds: number) => new Date(instant.getTime() + milliseconds);
const earlier = (a: Date, b: Date) => (a < b ? a : b);
const later = (a: Date, b: Date) => (a > b ? a : b);

/** The middle of a window: a visit that is not made by then leaves too little time to mend. */
export const middleOf = (window: FollowUpWindow): Date =>
	new Date((window.from.getTime() + window.until.getTime()) / 2);

function prepareDischargeDue({ plannedDischargeAt }: Subject, { now, policy, isUrgent }: DueContext): Date {
	const latest = later(plannedDischargeAt, now);
	return isUrgent ? earlier(latest, after(now, policy.decideUrgentMinutes * MINUTE)) : latest;
}

function bookingDue({ window }: Subject, { now, policy }: DueContext): Date {
	const usual = after(now, policy.bookHoursAfterDischarge * HOUR);
	return window ? later(now, earlier(usual, middleOf(window))) : usual;
}

/** 24 h before the visit (site policy), or half the time that is left where the visit is nearer than that. */
function confirmationDue(visitAt: Date, { now, policy }: DueContext): Date {
	const usual = after(visitAt, -policy.confirmHoursBefore * HOUR);
	const halfWay = after(now, Math.max(0, (visitAt.getTime() - now.getTime()) / 2));
	return usual > now ? usual : halfWay;
}

/** The shorter the window, the sooner a family that did not come is reached (site policy). */
function reachDue({ window }: Subject, { now, policy }: DueContext): Date {
	const windowHours = window ? (window.until.getTime() - window.from.getTime()) / HOUR : Infinity;
	const [short, middle, long] = policy.reachHours;
	return after(now, (windowHours <= 24 ? short : windowHours <= 48 ? middle : long) * HOUR);
}

function owed(stage: OpenStage, subject: Subject, context: DueContext): Owed {
	const { now, policy } = context;
	const atClinic = (role: Role, dueAt: Date): Owed => ({ role, siteId: subject.clinicId, dueAt });
	const atUnit = (dueAt: Date): Owed => ({ role: 'nurse', siteId: subject.birthSiteId, dueAt });
	switch (stage) {
		case 'before-discharge':
			return atUnit(prepareDischargeDue(subject, context));
		case 'to-book':
			return subject.handedOverAt
				? atClinic('desk', bookingDue(subject, context))
				: atUnit(later(subject.plannedDischargeAt, now));
		case 'booked':
			return atClinic('desk', confirmationDue(subject.visit?.startsAt ?? now, context));
		case 'confirmed':
			return atClinic('desk', after(subject.visit?.startsAt ?? now, policy.arrivalGraceMinutes * MINUTE));
		case 'missed':
			return atClinic('desk', reachDue(subject, context));
		case 'seen':
			return atClinic('pediatrician', after(now, policy.recordHours * HOUR));
		case 'result-waiting':
			return atClinic(
				'pediatrician',
				after(now, context.isUrgent ? policy.decideUrgentMinutes * MINUTE : policy.decideHours * HOUR)
			);
		case 'in-treatment':
			return atClinic('pediatrician', after(now, 24 * HOUR));
		case 'later-check':
			return atClinic('desk', subject.laterCheckAt ?? now);
	}
}

/**
 * The one next step of an open stage: who owes it, where, by when.
 * Example: booked for Wednesday 10:00, now Monday 10:00, policy 24 h: the desk, by Tuesday 10:00.
 * Source of the times: site policy (common practice, no source).
 */
export function nextStepOf(stage: OpenStage, subject: Subject, context: DueContext): NextStep {
	const { role, siteId, dueAt } = owed(stage, subject, context);
	return { kind: NEXT_STEP_OF[stage], role, siteId, staffId: null, dueAt, climb: 0, climbAt: dueAt };
}

/**
 * Where an unmet due time goes: the site's duty persons in their order, each after `climbMinutes`.
 * A site that names nobody hands the first climb to its pediatricians. Returns null when nobody is left above.
 */
export function climbOf(
	step: Pick<NextStep, 'climb' | 'role' | 'staffId'>,
	policy: SitePolicy,
	now: Date
): Pick<NextStep, 'climb' | 'role' | 'staffId' | 'climbAt'> | null {
	const climb = step.climb + 1;
	const staffId = policy.dutyStaffIds[step.climb] ?? null;
	const isLast = policy.dutyStaffIds[climb] === undefined;
	const climbAt = isLast ? null : after(now, policy.climbMinutes * MINUTE);
	if (staffId) return { climb, role: step.role, staffId, climbAt };
	return step.climb === 0 ? { climb, role: 'pediatrician', staffId: null, climbAt: null } : null;
}
