import { describe, expect, test } from 'vitest';
import { ROUTE_ACCESS } from '../../src/lib/server/auth/route-access';
import { findRoutes } from '../support/routes';

describe('the table of routes', () => {
	const routes = findRoutes();

	test('is read from a tree that has routes', () => {
		expect(routes.length).toBeGreaterThan(15);
		expect(routes.map(({ id }) => id)).toContain('/(auth)/sign-in');
	});

	test.each(routes)('knows $id as a $kind, with each of its actions or methods', ({ id, kind, entries }) => {
		const access = ROUTE_ACCESS[id];
		expect(access, `add ${id} to src/lib/server/auth/route-access.ts`).toBeDefined();
		expect(access?.kind).toBe(kind);
		const known = access?.kind === 'page' ? access.actions : access?.methods;
		expect(Object.keys(known ?? {}).sort()).toEqual([...entries].sort());
	});

	test.each(Object.keys(ROUTE_ACCESS))('names no route that is not there: %s', (id) => {
		expect(routes.map((route) => route.id)).toContain(id);
	});
});
