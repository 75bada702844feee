import { z } from 'zod';
import type { SitePolicy } from '../domain/followup/policy';
import { STANDARD_IDS } from '../domain/guideline/types';

const hours = (most: number) =>
	z.number('Type a number.').min(0.25, 'At least a quarter of an hour.').max(most, `At most ${most} hours.`);
const minutes = (least: number, most: number) =>
	z
		.number('Type a number.')
		.int('Whole minutes.')
		.min(least, `At least ${least} minutes.`)
		.max(most, `At most ${most} minutes.`);
const clock = z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, 'Type a time, such as 21:00.');
const staffId = z.string().max(16);

/** The policy as a form: every list flat, so that each value has a field of its own. */
export const policySchema = z
	.object({
		confirmHoursBefore: hours(72),
		bookHoursAfterDischarge: hours(24),
		arrivalGraceMinutes: minutes(5, 240),
		reachShortHours: hours(12),
		reachMiddleHours: hours(24),
		reachLongHours: hours(48),
		recordHours: hours(24),
		decideHours: hours(12),
		decideUrgentMinutes: minutes(5, 120),
		climbMinutes: minutes(5, 240),
		quietFrom: clock,
		quietUntil: clock,
		quietDays: z.array(z.number().int().min(1).max(7)),
		smsUndeliveredMinutes: minutes(5, 240),
		ladderMinutes: minutes(10, 720),
		firstDuty: staffId,
		secondDuty: staffId,
		welfareCheck: z.string().trim().min(1, 'Say what the site does.').max(400, 'At most 400 characters.')
	})
	.refine((p) => p.reachShortHours <= p.reachMiddleHours && p.reachMiddleHours <= p.reachLongHours, {
		path: ['reachLongHours'],
		error: 'A shorter window needs at most as much time as a longer one.'
	})
	.refine((p) => p.decideUrgentMinutes <= p.decideHours * 60, {
		path: ['decideUrgentMinutes'],
		error: 'At or above a threshold there cannot be more time than below it.'
	})
	.refine((p) => p.secondDuty === '' || p.secondDuty !== p.firstDuty, {
		path: ['secondDuty'],
		error: 'Choose another person than the first.'
	});

export type PolicyForm = z.output<typeof policySchema>;

/** The stored policy as the form shows it. */
export function formOfPolicy(policy: SitePolicy): PolicyForm {
	const { reachHours, dutyStaffIds, quietDays, ...same } = policy;
	const [reachShortHours, reachMiddleHours, reachLongHours] = reachHours;
	return {
		...same,
		reachShortHours,
		reachMiddleHours,
		reachLongHours,
		quietDays: [...quietDays],
		firstDuty: dutyStaffIds[0] ?? '',
		secondDuty: dutyStaffIds[1] ?? ''
	};
}

/** What the form says, as it is stored. */
export function policyOfForm(form: PolicyForm): SitePolicy {
	const { reachShortHours, reachMiddleHours, reachLongHours, firstDuty, secondDuty, ...same } = form;
	return {
		...same,
		reachHours: [reachShortHours, reachMiddleHours, reachLongHours],
		dutyStaffIds: [firstDuty, secondDuty].filter((id) => id !== '')
	};
}

export const standardSchema = z.object({
	standard: z.enum(STANDARD_IDS, 'Choose a guideline.')
});
