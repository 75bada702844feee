import { error } from '@sveltejs/kit';
import { can, type Action, type Resource } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';

const NOT_HERE = 'There is no such record, or it is not one of yours.';

/** The signed-in person. @throws 401 where nobody is signed in, which the route table should have caught before. */
export function requireActor(actor: StaffActor | null): StaffActor {
	if (actor === null) error(401, 'Please sign in first.');
	return actor;
}

/**
 * The guard of one record: returns the actor who may do the action to it.
 * @throws 404 where the record does not exist, belongs to another site, or the actor may not: nobody learns which.
 */
export function requireCan(
	actor: StaffActor | null,
	action: Action,
	resource: Resource | null | undefined
): StaffActor {
	if (actor === null || !resource || !can(actor, action, resource)) error(404, NOT_HERE);
	return actor;
}

/** The guard of something that belongs to the whole organisation, such as its people. */
export function requireCanEverywhere(actor: StaffActor | null, action: Action): StaffActor {
	return requireCan(actor, action, actor && { organisationId: actor.organisationId });
}
