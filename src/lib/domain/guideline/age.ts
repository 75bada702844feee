import { err, ok, type Result } from '../result';
import type { GestationalAge, Refusal } from './types';

export const HOUR_MS = 3_600_000;
export const DAY_MS = 24 * HOUR_MS;

/**
 * Hours lived between two instants, not rounded, negative when `at` is before birth. Instants know no time zone,
 * so a clock change in between neither adds nor takes an hour.
 */
export function ageHours(bornAt: Date, at: Date): number {
	return (at.getTime() - bornAt.getTime()) / HOUR_MS;
}

/** Age for showing: hours cut (never rounded up) to two decimals, so that it cannot cross a limit the age has not. */
export function shownHours(ageMs: number): number {
	return Math.floor(ageMs / 36_000) / 100;
}

/** Day of life, counted from 1: the first 24 hours are day 1. */
export function dayOfAge(bornAt: Date, at: Date): number {
	return Math.floor((at.getTime() - bornAt.getTime()) / DAY_MS) + 1;
}

const GESTATIONAL_AGE = /^(\d{2})\+([0-6])$/;

/** Reads '38+4' as 38 completed weeks and 4 days; refuses anything else. Range is the standard's business. */
export function parseGestationalAge(text: string): Result<GestationalAge, Refusal> {
	const match = GESTATIONAL_AGE.exec(text);
	if (!match) {
		return err({
			code: 'gestational-age-unreadable',
			field: 'gestationalAge',
			message: 'Write gestational age as weeks+days with days 0 to 6, for example 38+4.'
		});
	}
	return ok({ weeks: Number(match[1]), days: Number(match[2]) });
}

/** 38 weeks and 4 days as '38+4'. */
export function formatGestationalAge(age: GestationalAge): string {
	return `${age.weeks}+${age.days}`;
}
