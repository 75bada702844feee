import { HOUR_MS } from './age';
import type { Reading, Standard } from './standard';

type Weighed = Pick<Reading, 'atMs' | 'total'>;
type Limited = Pick<Standard, 'rateLimit'>;

/** Change an hour between two values of one unit, earlier first; negative when falling. */
export function risePerHour(earlier: Weighed, later: Weighed): number {
	return ((later.total - earlier.total) * HOUR_MS) / (later.atMs - earlier.atMs);
}

/** Whether a rise reaches (AAP) or passes (NICE) the published limit for a pair ending at this age. */
export function exceedsLimit(perHour: number, endAgeMs: number, standard: Limited): boolean {
	const limit = standard.rateLimit(endAgeMs);
	return limit.inclusive ? perHour >= limit.perHour - 1e-9 : perHour > limit.perHour + 1e-9;
}

export type RapidRise = 'none' | 'one-method' | 'two-methods';

/** Whether any trusted value rose too fast from the one before it, and whether both were taken by one method. */
export function rapidRise(readings: readonly Reading[], standard: Limited): RapidRise {
	let before: Reading | undefined;
	let found: RapidRise = 'none';
	for (const reading of readings) {
		if (reading.distrust !== null) continue;
		if (
			before &&
			before.atMs < reading.atMs &&
			exceedsLimit(risePerHour(before, reading), reading.ageMs, standard)
		) {
			if (before.serum === reading.serum) return 'one-method';
			found = 'two-methods';
		}
		before = reading;
	}
	return found;
}

/**
 * The instant at which a value rising steadily would meet the phototherapy line; null when it is not rising or
 * does not meet it inside the standard's range. A projection: newborns do not rise steadily.
 */
export function projectedCrossingAt(
	from: Pick<Reading, 'atMs' | 'ageMs' | 'total'>,
	perHour: number,
	lineAt: (ageMs: number) => number,
	lastAgeMs: number
): Date | null {
	if (!(perHour > 0) || from.total >= lineAt(from.ageMs)) return null;
	let startMs = from.ageMs;
	while (startMs < lastAgeMs) {
		const endMs = Math.min(Math.floor(startMs / HOUR_MS + 1) * HOUR_MS, lastAgeMs);
		const meetsMs = meeting({ from, perHour, startMs, endMs, lineAt });
		if (meetsMs !== null) return new Date(from.atMs + meetsMs - from.ageMs);
		startMs = endMs;
	}
	return null;
}

interface Step {
	readonly from: Pick<Reading, 'ageMs' | 'total'>;
	readonly perHour: number;
	readonly startMs: number;
	readonly endMs: number;
	readonly lineAt: (ageMs: number) => number;
}

/** Inside one hour the line is flat (AAP) or straight (NICE): its value just before the end tells which. */
function meeting({ from, perHour, startMs, endMs, lineAt }: Step): number | null {
	const valueAt = (ageMs: number): number => from.total + (perHour * (ageMs - from.ageMs)) / HOUR_MS;
	const gapAtStart = lineAt(startMs) - valueAt(startMs);
	if (gapAtStart <= 0) return startMs;
	const lastMs = endMs - 1;
	const gapAtLast = lineAt(lastMs) - valueAt(lastMs);
	if (gapAtLast > 0) return null;
	return Math.ceil(startMs + ((lastMs - startMs) * gapAtStart) / (gapAtStart - gapAtLast));
}
