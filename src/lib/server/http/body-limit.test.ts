import { describe, expect, it } from 'vitest';
import { isTooLong } from './body-limit';

const request = (bytes: number): Request =>
	new Request('http://127.0.0.1/', { headers: { 'content-length': String(bytes) } });

describe('the limit of a body', () => {
	it('is half a mebibyte for a form', () => {
		expect(isTooLong(request(512 * 1024), '/(auth)/sign-in')).toBe(false);
		expect(isTooLong(request(512 * 1024 + 1), '/(auth)/sign-in')).toBe(true);
	});

	it('lets a thousand records to the assessments', () => {
		expect(isTooLong(request(4 * 1024 * 1024), '/api/v1/assessments')).toBe(false);
		expect(isTooLong(request(4 * 1024 * 1024 + 1), '/api/v1/assessments')).toBe(true);
	});

	it('says nothing of a request without a length', () => {
		expect(isTooLong(new Request('http://127.0.0.1/'), '/')).toBe(false);
	});
});
