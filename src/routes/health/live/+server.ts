import type { RequestHandler } from './$types';

/** The process answers. */
export const GET: RequestHandler = () => Response.json({ live: true });
