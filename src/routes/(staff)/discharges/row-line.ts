import { hourLineOf } from '$lib/ui/hour-line/from-input';
import type { HourLineModel } from '$lib/ui/hour-line/model';
import type { PageData } from './$types';

type Row = PageData['rows'][number];

/** The hour line of a row of the list. */
export function rowLine(row: Row, now: Date): HourLineModel {
	const { standard, gestationalAge, bornAt, neurotoxicityRisks, albuminGramsPerDecilitre } = row;
	return hourLineOf({
		input: {
			standard,
			gestationalAge,
			bornAt,
			neurotoxicityRisks,
			albuminGramsPerDecilitre: albuminGramsPerDecilitre ?? undefined,
			bilirubin: row.measurements.map(({ measuredAt, method, total, unit }) => ({
				at: measuredAt,
				method,
				total,
				unit
			})),
			phototherapy: row.phototherapy.map(({ startedAt, endedAt, setting }) => ({
				from: startedAt,
				to: endedAt ?? undefined,
				setting
			}))
		},
		window: row.window ? { ...row.window, met: row.visits.some(({ state }) => state === 'arrived') } : null,
		visits: row.visits.map(({ startsAt, kind, state }) => ({
			at: startsAt,
			kind,
			state,
			siteName: row.clinicName
		})),
		timeZone: row.timeZone,
		now,
		stepHours: 12
	});
}
