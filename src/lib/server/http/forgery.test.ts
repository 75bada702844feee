import { expect, test } from 'vitest';
import { isForged } from './forgery';

const OWN = 'https://fadewell.example.org';
const forged = (path: string, method: string, headers: Record<string, string>, body?: string): boolean =>
	isForged(new Request(OWN + path, { method, headers, body }), new URL(OWN + path));

test.each([
	[false, '/people', 'GET', { origin: 'https://example.com' }],
	[false, '/people', 'POST', { origin: OWN, 'content-type': 'application/x-www-form-urlencoded' }],
	[true, '/people', 'POST', { origin: 'https://example.com' }],
	[true, '/people', 'POST', { origin: 'null' }],
	[true, '/people', 'POST', { 'content-type': 'application/x-www-form-urlencoded' }],
	[true, '/people', 'POST', { 'content-type': 'multipart/form-data; boundary=x' }],
	[true, '/people', 'POST', { 'content-type': 'Text/Plain; charset=utf-8' }],
	[true, '/people', 'POST', {}],
	[true, '/people', 'DELETE', { origin: 'https://example.com', 'content-type': 'application/json' }],
	[false, '/api/v1/assessments', 'POST', { 'content-type': 'application/json' }],
	[false, '/webhooks/sms/inbound', 'POST', { 'content-type': 'application/x-www-form-urlencoded' }],
	[true, '/webhooks-of-others', 'POST', { 'content-type': 'application/x-www-form-urlencoded' }]
] as const)('forged: %s for %s %s %j', (expected, path, method, headers) => {
	expect(forged(path, method, headers)).toBe(expected);
});
