import type { StaffActor } from '../../domain/access/roles';
import type { FieldValues } from '../../domain/messaging/template';
import type { Ctx } from '../context';
import { findOrganisation, listSites } from '../repos/sites';
import { fieldValues } from '../wording/field-values';
import type { WordingPlace } from './wording';

const DAY = 86_400_000;

/** Values for a preview: the organisation's own clinic with the longest name, an invented visit and words. */
export async function sampleValues(
	ctx: Ctx,
	actor: StaffActor,
	{ channel, language }: Pick<WordingPlace, 'channel' | 'language'>
): Promise<FieldValues> {
	const sites = await listSites(ctx.db, actor.organisationId);
	const organisation = await findOrganisation(ctx.db, actor.organisationId);
	const clinics = sites.filter(({ kind }) => kind === 'clinic');
	const [clinic] = [...(clinics.length > 0 ? clinics : sites)].sort((a, b) => b.name.length - a.name.length);
	if (clinic === undefined) return {};
	return fieldValues({
		language,
		channel,
		clinic,
		emergencyNumber: organisation?.emergencyNumber ?? '',
		link: `${ctx.config.publicBaseUrl}/v/${'k7f2q9'.repeat(4).slice(0, 22)}`,
		visit: { startsAt: new Date(ctx.clock.now().getTime() + 2 * DAY), isConfirmed: false },
		checkInResult: 'today',
		words: 'Please bring the yellow card.',
		choices: ['M', 'L'],
		finding: 'A next step is 5 hours late.',
		operations: `${ctx.config.origin}/operations`
	});
}
