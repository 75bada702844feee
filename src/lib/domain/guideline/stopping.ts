import { lastWhere, type Case, type Reading, type Standard } from './standard';

/**
 * Whether serum under the last course showed that stopping it is an option. A later skin value that asks for serum
 * speaks against it while the course runs, little as skin values say under light.
 */
export function showedStopLevel(
	readings: readonly Reading[],
	known: Case,
	{ stopLevel }: Pick<Standard, 'stopLevel'>
): boolean {
	const { last, running, stopMs } = known.treatment;
	if (!last) return false;
	const startMs = last.from.getTime();
	const untilMs = running ? Infinity : stopMs;
	const serum = lastWhere(readings, (one) => one.serum && one.atMs > startMs && one.atMs <= untilMs);
	if (!serum) return false;
	if (running && readings.some((one) => one.atMs > serum.atMs && one.confirm !== null)) return false;
	const { weeks, atRisk, bornMs } = known;
	const level = stopLevel({ weeks, atRisk, startAgeMs: startMs - bornMs, ageMs: serum.ageMs });
	return level !== null && Math.round((level - serum.total) * 10) >= 0;
}
