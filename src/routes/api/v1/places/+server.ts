import { placesQuerySchema } from '$lib/schemas/desk';
import { requireActor } from '$lib/server/auth/guard';
import { listPlaces } from '$lib/server/services/places';
import { error, json } from '@sveltejs/kit';
import type { RequestHandler } from './$types';

/** The longest stretch that one question may cover. */
const MOST_DAYS = 60;
const DAY = 86_400_000;

/** A clinic's places between two instants (`clinicId`, `from`, `until` as ISO 8601 with offset), with what is free. */
export const GET: RequestHandler = async ({ locals, url }) => {
	const asked = placesQuerySchema.safeParse(Object.fromEntries(url.searchParams));
	if (!asked.success)
		error(400, 'Ask with clinicId, from and until; the times in ISO 8601 with their offset.');
	const { from, until } = asked.data;
	if (until < from) error(400, 'The end lies before the beginning.');
	if (until.getTime() - from.getTime() > MOST_DAYS * DAY) error(400, `At most ${MOST_DAYS} days at a time.`);
	const places = await listPlaces(locals.ctx, requireActor(locals.actor), asked.data);
	if (!places.ok) error(404, 'There is no such clinic, or it is not one of yours.');
	return json({
		places: places.value.map(({ startsAt, endsAt, kind, freeNumbers, placesAtOnce }) => ({
			startsAt,
			endsAt,
			kind,
			free: freeNumbers.length,
			of: placesAtOnce
		}))
	});
};
