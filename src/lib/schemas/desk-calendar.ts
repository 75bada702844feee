import type { Stage } from '../domain/followup/states';
import type { VisitKind, VisitState } from '../domain/followup/visit';
import type { FollowUpWindow } from '../domain/guideline/types';
import type { ClinicChoice, DeskRow, VisitView } from './desk-view';

export interface TakenView {
	readonly visitId: string;
	readonly followUpId: string;
	readonly familyName: string;
	readonly givenName: string;
	readonly state: VisitState;
	readonly isOutsideWindow: boolean;
}

/** One time of an opening: how many places are free, and who has taken the others. */
export interface CalendarTime {
	readonly startsAt: Date;
	readonly endsAt: Date;
	readonly kind: VisitKind;
	readonly free: number;
	readonly taken: readonly TakenView[];
	readonly isPast: boolean;
	/** Inside the window of the newborn that a place is chosen for; null when none is. */
	readonly isInsideWindow: boolean | null;
}

export interface CalendarOpening {
	readonly kind: VisitKind;
	/** Local `HH:MM`; null for visits outside every opening. */
	readonly hours: { readonly from: string; readonly until: string } | null;
	/** Free places that have not passed, and all places. */
	readonly free: number;
	readonly places: number;
	readonly times: readonly CalendarTime[];
}

export interface CalendarDay {
	/** Local date. */
	readonly on: string;
	readonly startsAt: Date;
	readonly isToday: boolean;
	readonly isPast: boolean;
	/** Why the clinic is closed; null when it is not. */
	readonly closedBecause: string | null;
	readonly openings: readonly CalendarOpening[];
	readonly free: number;
	readonly taken: number;
}

/** The newborn that a place is chosen for. */
export interface ChoosingFor {
	readonly followUpId: string;
	readonly familyName: string;
	readonly givenName: string;
	readonly recordNumber: string;
	readonly stage: Stage;
	readonly window: FollowUpWindow | null;
	readonly visit: VisitView | null;
	readonly mayApprove: boolean;
}

export interface CalendarView {
	readonly nowAt: Date;
	readonly clinics: readonly ClinicChoice[];
	readonly clinic: ClinicChoice;
	/** The day that narrow screens show. */
	readonly on: string;
	readonly todayOn: string;
	readonly previousOn: string;
	readonly nextOn: string;
	readonly days: readonly CalendarDay[];
	readonly choosingFor: ChoosingFor | null;
}

export interface MorningRow extends DeskRow {
	readonly visitId: string;
	readonly startsAt: Date;
	readonly kind: VisitKind;
	readonly state: VisitState;
	readonly isOutsideWindow: boolean;
	/** What may be marked now. */
	readonly mayConfirm: boolean;
	readonly mayArrive: boolean;
	readonly mayMiss: boolean;
}

export interface MorningView {
	readonly nowAt: Date;
	readonly clinics: readonly ClinicChoice[];
	readonly clinic: ClinicChoice;
	readonly on: string;
	readonly todayOn: string;
	readonly previousOn: string;
	readonly nextOn: string;
	readonly startsAt: Date;
	readonly closedBecause: string | null;
	readonly rows: readonly MorningRow[];
}
