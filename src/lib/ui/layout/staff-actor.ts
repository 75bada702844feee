import type { Role } from '../../domain/access/roles';

/** What the frame of the staff's pages shows about who is signed in. */
export interface StaffFrameActor {
	readonly staffId: string;
	readonly name: string;
	readonly email: string;
	readonly roles: readonly {
		readonly role: Role;
		readonly siteId: string | null;
		readonly siteName: string | null;
	}[];
	readonly organisationName: string;
	readonly currentSite: { readonly id: string; readonly name: string; readonly timeZone: string } | null;
}
