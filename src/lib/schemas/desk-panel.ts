import type { AlertKind } from '../domain/followup/alert';
import type { AttemptChannel, AttemptOutcome } from '../domain/followup/attempt';
import type { CallAim, LadderRow } from '../domain/followup/call-script';
import type { VisitKind } from '../domain/followup/visit';
import type { AlertView, ClinicChoice, DeskRow } from './desk-view';

export interface FreePlace {
	readonly startsAt: Date;
	readonly endsAt: Date;
	readonly kind: VisitKind;
	/** Free places at this time, and how many there are. */
	readonly free: number;
	readonly of: number;
}

/** What the call panel of one newborn shows. */
export interface CallPanel {
	readonly nowAt: Date;
	readonly row: DeskRow;
	readonly clinic: ClinicChoice & {
		readonly phone: string;
		readonly afterHoursPhone: string;
		readonly emergencyNumber: string;
	};
	/** What the call has to bring about, the most pressing first. */
	readonly aims: readonly CallAim[];
	readonly laterCheckAsks: string | null;
	/** Only while the family is missing. */
	readonly ladder: readonly LadderRow[];
	/** Times outside the window that wait for the pediatrician. */
	readonly asked: readonly (AlertView & { readonly startsAt: Date; readonly visitKind: VisitKind })[];
	readonly places: { readonly inside: readonly FreePlace[]; readonly outside: readonly FreePlace[] };
	readonly attempts: readonly {
		readonly id: string;
		readonly at: Date;
		readonly channel: AttemptChannel;
		readonly outcome: AttemptOutcome;
		readonly note: string | null;
		readonly carerName: string | null;
		readonly staffName: string | null;
	}[];
	readonly settled: readonly {
		readonly id: string;
		readonly kind: AlertKind;
		readonly settledAt: Date;
		readonly settledHow: string | null;
		readonly staffName: string | null;
	}[];
	readonly may: {
		readonly log: boolean;
		readonly manage: boolean;
		readonly settle: boolean;
		readonly approve: boolean;
	};
}
