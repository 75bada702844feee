import type { Disposition, FollowUpWindow } from '../guideline/types';
import type { Role } from '../access/roles';
import type { NextStepKind, Outcome, Stage } from './states';

/** What is owed now: exactly one per open follow-up, with an owner and a due time. */
export interface NextStep {
	readonly kind: NextStepKind;
	readonly role: Role;
	readonly siteId: string;
	/** Named only after a climb. */
	readonly staffId: string | null;
	readonly dueAt: Date;
	/** How many persons it has climbed: 0 is the role itself. */
	readonly climb: number;
	/** When it climbs next if unmet; null once nobody is left above. */
	readonly climbAt: Date | null;
}

export interface OpenVisit {
	readonly id: string;
	readonly startsAt: Date;
	readonly isConfirmed: boolean;
}

/** What the rules need to know of a follow-up; the row in the database carries the same. */
export interface FollowUpState {
	readonly stage: Stage;
	readonly round: number;
	readonly birthSiteId: string;
	readonly clinicId: string;
	readonly plannedDischargeAt: Date;
	readonly handedOverAt: Date | null;
	readonly disposition: Disposition | null;
	readonly window: FollowUpWindow | null;
	readonly visit: OpenVisit | null;
	readonly laterCheckAt: Date | null;
	readonly laterCheckAsks: string | null;
	readonly nextStep: NextStep | null;
	readonly outcome: Outcome | null;
	readonly closedAt: Date | null;
	readonly mergedIntoId: string | null;
}
