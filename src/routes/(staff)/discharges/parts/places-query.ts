import { z } from 'zod';
import { VISIT_KINDS } from '$lib/domain/followup/visit';
import { formatDay } from '$lib/format/time';

const answer = z.object({
	places: z.array(
		z.object({
			startsAt: z.coerce.date(),
			endsAt: z.coerce.date(),
			kind: z.enum(VISIT_KINDS),
			free: z.number()
		})
	)
});

export type FreePlace = z.infer<typeof answer>['places'][number];

/** The places of a clinic between two instants that are still free. @throws Error with a sentence for the nurse */
export async function fetchFreePlaces(
	asked: { readonly clinicId: string; readonly from: Date; readonly until: Date },
	signal: AbortSignal
): Promise<FreePlace[]> {
	const query = new URLSearchParams({
		clinicId: asked.clinicId,
		from: asked.from.toISOString(),
		until: asked.until.toISOString()
	});
	const response = await fetch(`/api/v1/places?${query}`, {
		signal,
		headers: { accept: 'application/json' }
	});
	if (!response.ok) throw new Error('The free places could not be loaded.');
	return answer.parse(await response.json()).places.filter(({ free }) => free > 0);
}

/** The places under their local day, in the order given. */
export function placesByDay(places: readonly FreePlace[], timeZone: string): [string, FreePlace[]][] {
	const days = new Map<string, FreePlace[]>();
	for (const place of places) {
		const day = formatDay(place.startsAt, { timeZone });
		days.set(day, [...(days.get(day) ?? []), place]);
	}
	return [...days];
}
