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

/**
 * Goes through the pairs that are held against the limit: each trusted value with the one before it and, where that is
 * another, the one before it by the same method.
 */
export function forEachPair(
	readings: readonly Reading[],
	look: (earlier: Reading, later: Reading) => void
): void {
	let before: Reading | undefined;
	let serum: Reading | undefined;
	let skin: Reading | undefined;
	for (const later of readings) {
		if (later.distrust !== null) continue;
		const same = later.serum ? serum : skin;
		if (same && same !== before) look(same, later);
		if (before) look(before, later);
		before = later;
		if (later.serum) serum = later;
		else skin = later;
	}
}

/** Whether any trusted value rose too fast, and whether both of such a pair were taken by one method. */
export function rapidRise(readings: readonly Reading[], standard: Limited): RapidRise {
	let found: RapidRise = 'none';
	if (readings.length < 2) return found;
	forEachPair(readings, (earlier, later) => {
		if (found === 'one-method') return;
		if (!exceedsLimit(risePerHour(earlier, later), later.ageMs, standard)) return;
		found = earlier.serum === later.serum ? 'one-method' : 'two-methods';
	});
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
