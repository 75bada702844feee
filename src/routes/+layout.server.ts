import type { LayoutServerLoad } from './$types';

/** What every page needs to draw itself; what a person may see is decided by each page, not here. */
export const load: LayoutServerLoad = ({ locals }) => ({ theme: locals.theme });
