import { familyLocale } from '$lib/i18n/family-locale';
import { carerOfLink, getParentPage } from '$lib/server/services/parent-page';
import { error } from '@sveltejs/kit';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = async ({ params, locals, setHeaders, url }) => {
	setHeaders({ 'cache-control': 'no-store', 'x-robots-tag': 'noindex' });
	const carer = await carerOfLink(locals.ctx, params.token);
	if (!carer.ok) error(carer.error === 'ended' ? 410 : 404, 'link');
	const page = await getParentPage(locals.ctx, carer.value);
	if (!page.ok) error(404, 'link');
	locals.language = familyLocale(url.searchParams.get('lang'), page.value.language);
	return { page: page.value, language: locals.language };
};
