export const ROLES = ['nurse', 'desk', 'pediatrician', 'admin'] as const;
export type Role = (typeof ROLES)[number];

/** Who acted: a member of staff, a carer through a link or a text, or the worker by itself. */
export type ActorKind = 'staff' | 'carer' | 'worker';

export interface RoleAtSite {
	readonly role: Role;
	/** Null for an administrator, whose role covers the organisation. */
	readonly siteId: string | null;
}

/** A signed-in member of staff. */
export interface StaffActor {
	readonly kind: 'staff';
	readonly staffId: string;
	readonly organisationId: string;
	readonly name: string;
	readonly roles: readonly RoleAtSite[];
}

/** A carer known by an unguessable link or by the telephone that wrote. */
export interface CarerActor {
	readonly kind: 'carer';
	readonly carerId: string;
	readonly followUpId: string;
}

export interface WorkerActor {
	readonly kind: 'worker';
	readonly name: string;
}

export type Actor = StaffActor | CarerActor | WorkerActor;

/** The id written beside what the actor did. */
export function actorId(actor: Actor): string {
	switch (actor.kind) {
		case 'staff':
			return actor.staffId;
		case 'carer':
			return actor.carerId;
		case 'worker':
			return actor.name;
	}
}
