import { aap2022 } from './aap-2022';
import { niceCg98 } from './nice-cg98';
import type { Standard } from './standard';
import type { BilirubinUnit, StandardId } from './types';

const MODULES: Readonly<Record<StandardId, Standard>> = {
	'aap-2022': aap2022,
	'nice-cg98': niceCg98
};

/** The module of a standard. Add a third standard here. */
export function standardOf(id: StandardId): Standard {
	return MODULES[id];
}

/** What a person choosing a standard, or a chart's axis, needs to know of it. */
export interface StandardSummary {
	readonly id: StandardId;
	readonly title: string;
	readonly edition: string;
	readonly unit: BilirubinUnit;
	readonly firstWeek: number;
}

/** Every standard there is to choose from. */
export const STANDARDS: readonly StandardSummary[] = Object.values(MODULES).map(
	({ id, title, edition, unit, coverage }) => ({ id, title, edition, unit, firstWeek: coverage.firstWeek })
);
