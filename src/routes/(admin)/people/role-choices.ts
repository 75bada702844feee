import type { Choice } from '$lib/ui/forms/field';

export interface ChoosableSite {
	readonly id: string;
	readonly name: string;
	readonly kind: 'birth-unit' | 'clinic';
}

/** Every role that the organisation's sites allow, as the words of the form. */
export function roleChoices(sites: readonly ChoosableSite[]): Choice[] {
	const atSites = sites.flatMap(({ id, name, kind }) =>
		kind === 'birth-unit'
			? [{ value: `nurse@${id}`, label: `Nurse, ${name}` }]
			: [
					{ value: `desk@${id}`, label: `Front desk, ${name}` },
					{ value: `pediatrician@${id}`, label: `Pediatrician, ${name}` }
				]
	);
	return [
		...atSites,
		{ value: 'admin', label: 'Administrator', hint: 'People, sites and policy; no newborns.' }
	];
}
