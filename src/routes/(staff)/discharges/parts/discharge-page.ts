import type { Stage } from '$lib/domain/followup/states';
import type { VisitKind, VisitState } from '$lib/domain/followup/visit';
import type { StandardId } from '$lib/domain/guideline/types';
import type { DischargeForm } from '$lib/schemas/discharge';
import type { SuperValidated } from 'sveltekit-superforms';

export interface SiteView {
	readonly id: string;
	readonly name: string;
	readonly timeZone: string;
}

/** What the form's page needs, for a new discharge and for one on record. */
export interface DischargePageData {
	readonly form: SuperValidated<DischargeForm, App.Superforms.Message>;
	readonly now: Date;
	readonly standard: StandardId;
	readonly unit: SiteView;
	readonly clinics: readonly SiteView[];
	readonly followUpId?: string;
	readonly stage?: Stage;
	readonly handedOverAt?: Date | null;
	readonly mayEdit?: boolean;
	readonly visits?: readonly {
		readonly startsAt: Date;
		readonly kind: VisitKind;
		readonly state: VisitState;
		readonly isOpen: boolean | null;
	}[];
}

/** The sentences beside one field, of the form's answer and of the standard while typing. */
export type Says = (field: string, row?: number) => string[] | undefined;

/** The sections in the order in which the facts become known; the numbers are also their keys. */
export const SECTIONS = [
	{ id: 'birth', label: 'Birth' },
	{ id: 'measurements', label: 'Measurements' },
	{ id: 'risks', label: 'Risks' },
	{ id: 'feeding', label: 'Feeding and weight' },
	{ id: 'family', label: 'Family' },
	{ id: 'visit', label: 'Visit' },
	{ id: 'papers', label: 'Papers' }
] as const;
