import type { VisitKind, VisitState } from '../../domain/followup/visit';
import type {
	BilirubinUnit,
	CheckInResult,
	CurvePoint,
	Method,
	PhototherapyCourse,
	RateOfRise,
	WindowTest
} from '../../domain/guideline/types';

/** `row`: one line of a table. `card`: beside a form. `full`: the clinician's chart. `plain`: for families. */
export type HourLineSize = 'row' | 'card' | 'full' | 'plain';

export interface HourLineMeasurement {
	readonly at: Date;
	readonly method: Method;
	/** In the model's unit. */
	readonly total: number;
	/** Phototherapy threshold minus total at that age, as the engine gives it. */
	readonly difference?: number;
	/** False where the standard says not to decide on this value. */
	readonly trusted?: boolean;
}

export interface HourLineWindow {
	readonly from: Date;
	readonly until: Date;
	readonly test?: WindowTest;
	/** True once the newborn was seen for it; an unmet window in the past is drawn hatched. */
	readonly met: boolean;
}

export interface HourLineVisit {
	readonly at: Date;
	readonly kind: VisitKind;
	readonly state: VisitState;
	/** Name of the clinic, for the sentence and the table. */
	readonly siteName?: string;
}

export interface HourLineMessage {
	readonly at: Date;
	readonly direction: 'to-family' | 'from-family';
	readonly channel: 'sms' | 'mail' | 'call';
	readonly failed?: boolean;
}

export interface HourLineCheckIn {
	readonly at: Date;
	readonly result: CheckInResult;
}

/** Everything that lies on a newborn's first days, in one picture. All instants are absolute, hours count from birth. */
export interface HourLineModel {
	readonly bornAt: Date;
	readonly timeZone: string;
	readonly now: Date;
	/** The stretch shown, in hours since birth. `hourLineSpan` proposes one. */
	readonly fromHour: number;
	readonly untilHour: number;
	/** The standard's unit, in which curve, measurements and rates are given. */
	readonly unit: BilirubinUnit;
	/** Sorted by hour; may be empty (no threshold for this newborn, or a family's page). */
	readonly curve?: readonly CurvePoint[];
	/** Sorted by time; `rates` points into it by index. */
	readonly measurements?: readonly HourLineMeasurement[];
	readonly rates?: readonly RateOfRise[];
	readonly window?: HourLineWindow | null;
	readonly visits?: readonly HourLineVisit[];
	readonly messages?: readonly HourLineMessage[];
	readonly checkIns?: readonly HourLineCheckIn[];
	readonly phototherapy?: readonly PhototherapyCourse[];
}
