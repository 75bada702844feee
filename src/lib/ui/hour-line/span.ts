import { ageHoursAt } from '../../format/duration';
import type { HourLineModel } from './model';

const DAY = 24;
const SHORTEST = 5 * DAY;
const LONGEST = 14 * DAY;

/**
 * A stretch that shows all that matters: from birth, in whole days, at least five and at most fourteen days.
 * When something lies later than that, the stretch slides so that its end holds the latest thing.
 */
export function hourLineSpan(model: Omit<HourLineModel, 'fromHour' | 'untilHour' | 'unit'>): {
	readonly fromHour: number;
	readonly untilHour: number;
} {
	const instants = [
		model.now,
		...(model.measurements ?? []).map((m) => m.at),
		...(model.visits ?? []).map((v) => v.at),
		...(model.checkIns ?? []).map((c) => c.at),
		...(model.window ? [model.window.until] : [])
	];
	const latest = Math.max(...instants.map((at) => ageHoursAt(model.bornAt, at)));
	const untilHour = Math.max(SHORTEST, Math.ceil((latest + 6) / DAY) * DAY);
	return { fromHour: Math.max(0, untilHour - LONGEST), untilHour };
}

export type SpanChange = 'in' | 'out' | 'earlier' | 'later';

/** The next stretch after a key press; never before birth, never shorter than 12 hours nor longer than 60 days. */
export function changeSpan(
	span: { readonly fromHour: number; readonly untilHour: number },
	change: SpanChange,
	focusHour: number
): { readonly fromHour: number; readonly untilHour: number } {
	const length = span.untilHour - span.fromHour;
	if (change === 'earlier' || change === 'later') {
		const step = (change === 'later' ? 1 : -1) * (length / 4);
		const fromHour = Math.max(0, span.fromHour + step);
		return { fromHour, untilHour: fromHour + length };
	}
	const next = Math.min(60 * DAY, Math.max(12, change === 'in' ? length / 1.5 : length * 1.5));
	const focus = Math.min(span.untilHour, Math.max(span.fromHour, focusHour));
	const share = (focus - span.fromHour) / length;
	const fromHour = Math.max(0, focus - share * next);
	return { fromHour, untilHour: fromHour + next };
}
