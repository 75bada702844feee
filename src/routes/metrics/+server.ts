import { METRICS_TYPE, renderMetrics } from '$lib/server/services/metrics';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async ({ locals }) =>
	new Response(await renderMetrics(locals.ctx), { headers: { 'content-type': METRICS_TYPE } });
