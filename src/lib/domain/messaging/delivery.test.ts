import { describe, expect, it } from 'vitest';
import { isProven, isRefused, parseDeliveryStatus, replacedBy } from './delivery';

describe('the order of delivery reports', () => {
	it('lets a later status replace an earlier one, never the other way', () => {
		expect(replacedBy('delivered')).toContain('sent');
		expect(replacedBy('sent')).not.toContain('delivered');
		expect(replacedBy('sent')).not.toContain('sent');
	});

	it('believes a delivery that is reported after a failure', () => {
		expect(replacedBy('delivered')).toContain('undelivered');
		expect(replacedBy('undelivered')).not.toContain('delivered');
	});

	it('does not know words of its own', () => {
		expect(parseDeliveryStatus('delivered')).toBe('delivered');
		expect(parseDeliveryStatus('toString')).toBeNull();
		expect(parseDeliveryStatus('receiving')).toBeNull();
	});

	it('tells what reached the telephone from what was given up', () => {
		expect(isProven('delivered')).toBe(true);
		expect(isProven('sent')).toBe(false);
		expect(isRefused('undelivered')).toBe(true);
		expect(isRefused('delivered')).toBe(false);
	});
});
