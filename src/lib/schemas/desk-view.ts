import type { Role } from '../domain/access/roles';
import type { AlertKind } from '../domain/followup/alert';
import type { AttemptChannel, AttemptOutcome } from '../domain/followup/attempt';
import type { QueueGroup } from '../domain/followup/desk-queue';
import type { NextStepKind, Stage } from '../domain/followup/states';
import type { VisitKind, VisitState } from '../domain/followup/visit';
import type { CheckInResult, FollowUpWindow } from '../domain/guideline/types';
import type { Language } from '../domain/messaging/language';
import type { HourLineModel } from '../ui/hour-line/model';
import type { StrayNumber } from './stray';

/** What the front desk's screens show; the same shapes from a page's load and from the JSON that keeps it fresh. */

export interface ClinicChoice {
	readonly id: string;
	readonly name: string;
	readonly timeZone: string;
}

export interface CarerView {
	readonly id: string;
	readonly name: string;
	readonly relation: string;
	/** E.164. */
	readonly phone: string | null;
	readonly email: string | null;
	readonly language: Language;
	/** Texts or mail reach this carer now: consented, not stopped. */
	readonly takesSms: boolean;
	readonly takesMail: boolean;
}

export interface AlertView {
	readonly id: string;
	readonly kind: AlertKind;
	readonly detail: string;
	readonly role: Role;
	readonly climb: number;
	readonly dueAt: Date;
}

export interface VisitView {
	readonly id: string;
	readonly kind: VisitKind;
	readonly state: VisitState;
	readonly startsAt: Date;
	readonly isOutsideWindow: boolean;
	readonly otherTimeAskedAt: Date | null;
	readonly otherTimeWish: string | null;
}

/** The latest sign of a family, or try to reach it. */
export type LastContact =
	| {
			readonly kind: 'attempt';
			readonly at: Date;
			readonly channel: AttemptChannel;
			readonly outcome: AttemptOutcome;
	  }
	| { readonly kind: 'check-in'; readonly at: Date; readonly result: CheckInResult }
	| { readonly kind: 'words' | 'text-sent' | 'mail-sent' | 'confirmed'; readonly at: Date };

/** Who a newborn is and how it stands: what every row of the desk begins with. */
export interface DeskRow {
	readonly followUpId: string;
	readonly clinicId: string;
	readonly timeZone: string;
	readonly givenName: string;
	readonly familyName: string;
	readonly recordNumber: string;
	readonly bornAt: Date;
	readonly bornOn: string;
	readonly stage: Stage;
	readonly nextStep: {
		readonly kind: NextStepKind;
		readonly role: Role;
		readonly climb: number;
		readonly dueAt: Date;
	} | null;
	/** Null where no window counts at this stage. */
	readonly window: FollowUpWindow | null;
	readonly visit: VisitView | null;
	readonly alerts: readonly AlertView[];
	/** In the order of calling. */
	readonly carers: readonly CarerView[];
	readonly lastContact: LastContact | null;
	readonly hourLine: HourLineModel;
}

export interface QueueRow extends DeskRow {
	readonly groups: readonly QueueGroup[];
	/** The first time by which the desk owes something. */
	readonly firstDueAt: Date;
}

export interface QueueView {
	readonly nowAt: Date;
	/** Texts of numbers that belong to no family, whatever the clinic or group chosen; alarming ones first. */
	readonly strays: readonly StrayNumber[];
	readonly hasMoreStrays: boolean;
	readonly clinics: readonly ClinicChoice[];
	/** Null for all of the reader's clinics. */
	readonly clinicId: string | null;
	readonly group: QueueGroup | null;
	readonly counts: Readonly<Record<QueueGroup, number>>;
	/** Newborns in the queue, whatever the group. */
	readonly all: number;
	/** Newborns in the chosen group; `rows` may hold fewer. */
	readonly total: number;
	readonly rows: readonly QueueRow[];
}

const INSTANT_KEY = /(At|^at|^from|^until|^now)$/;

/** Reads the desk's JSON: whatever is named as an instant becomes a `Date` again. */
export function readDeskJson(text: string): unknown {
	return JSON.parse(text, (key, value: unknown) =>
		INSTANT_KEY.test(key) && typeof value === 'string' ? new Date(value) : value
	);
}
