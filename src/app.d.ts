import type { StaffActor } from '$lib/domain/access/roles';
import type { Language } from '$lib/domain/messaging/language';
import type { Ctx } from '$lib/server/context';
import type { Theme } from '$lib/ui/theme';

declare global {
	namespace App {
		interface Locals {
			/** The signed-in member of staff; null for parents, for strangers, and before the second factor. */
			actor: StaffActor | null;
			/** The session of the request's cookie, complete or not; its stored form is a hash of this. */
			sessionId: string | null;
			/** Set between the password and the second factor, when nobody is signed in yet. */
			pendingStaffId: string | null;
			ctx: Ctx;
			requestId: string;
			theme: Theme;
			/** Language of the page; a parents' page sets it to the carer's before it renders. */
			language: Language;
		}
		interface Error {
			/** A plain sentence for the person. */
			message: string;
			/** Finds the cause in the log; absent where nothing broke. */
			errorId?: string;
		}
		namespace Superforms {
			/** What a form answers beside its fields: something was done, or was refused and why. */
			interface Message {
				readonly tone: 'done' | 'refused';
				readonly text: string;
			}
		}
	}
}

export {};
