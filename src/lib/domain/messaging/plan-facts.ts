import type { SitePolicy } from '../followup/policy';
import type { Outcome, Stage } from '../followup/states';
import type { VisitState } from '../followup/visit';
import type { CheckInResult } from '../guideline/types';
import type { Channel, MessageKind } from './kinds';
import type { Language } from './language';

/** A carer as far as messages are concerned: which channels are open to us now. */
export interface PlanCarer {
	readonly id: string;
	/** 1 is asked first. */
	readonly callOrder: number;
	readonly language: Language;
	/** Has a number, consents, and has not stopped it. */
	readonly canSms: boolean;
	readonly canMail: boolean;
}

export interface PlanVisit {
	readonly id: string;
	readonly state: VisitState;
	readonly startsAt: Date;
	readonly bookedAt: Date;
	/** When it was missed, cancelled or moved away. */
	readonly endedAt: Date | null;
	readonly otherTimeAskedAt: Date | null;
	/** Shared with the visits it was moved from. */
	readonly calendarUid: string;
	/** A message about this visit left us, or may have. */
	readonly isTold: boolean;
}

export interface PlanCheckIn {
	readonly id: string;
	readonly carerId: string | null;
	readonly result: CheckInResult;
	readonly answeredAt: Date;
}

/** All that the plan of messages depends on; the same facts always give the same plan. */
export interface PlanFacts {
	readonly followUpId: string;
	readonly stage: Stage;
	readonly outcome: Outcome | null;
	readonly closedAt: Date | null;
	readonly bornAt: Date;
	/** Days of age at which the standard asks whether jaundice persists. */
	readonly prolongedCheckDays: readonly number[];
	/** The hand-over, or the planned discharge while that is still to come. */
	readonly dischargedAt: Date;
	readonly windowFromAt: Date | null;
	readonly windowUntilAt: Date | null;
	readonly laterCheckAt: Date | null;
	/** The last attempt that reached the family. */
	readonly lastReachedAt: Date | null;
	readonly timeZone: string;
	readonly policy: SitePolicy;
	readonly carers: readonly PlanCarer[];
	readonly visits: readonly PlanVisit[];
	readonly checkIns: readonly PlanCheckIn[];
}

/** One message that the follow-up, as it is, asks for. */
export interface PlannedMessage {
	readonly kind: MessageKind;
	/** What it is about: a visit, a local date, a check-in. */
	readonly occasion: string;
	readonly carerId: string;
	readonly channel: Channel;
	readonly language: Language;
	readonly priority: number;
	readonly runAt: Date;
	readonly expiresAt: Date;
	readonly facts: Readonly<Record<string, string>>;
	readonly dedupeKey: string;
}

/** Priorities of the outbox: up to 1 quiet hours do not hold them. */
export const PRIORITY = { urgent: 0, answer: 1, soon: 3, ordinary: 5, canWait: 9 } as const;

/** One word per follow-up, kind, occasion, carer and channel; unique in the database. */
export const dedupeKeyOf = (
	followUpId: string,
	message: Pick<PlannedMessage, 'kind' | 'occasion' | 'carerId' | 'channel'>
): string => [followUpId, message.kind, message.occasion, message.carerId, message.channel].join(':');
