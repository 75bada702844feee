import { expect, test } from 'vitest';
import { safeNext } from './refusal';

test.each([
	['/queue', '/queue'],
	['/queue?late=1', '/queue?late=1'],
	[null, '/'],
	['', '/'],
	['queue', '/'],
	['//example.com', '/'],
	['/\\example.com', '/'],
	['https://example.com', '/'],
	['javascript:alert(1)', '/'],
	['/sign-out', '/'],
	['/sign-in', '/']
])('after signing in, %j leads to %s', (next, path) => {
	expect(safeNext(next)).toBe(path);
});
