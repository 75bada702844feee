import { textSize } from '../../src/lib/domain/messaging/segments';
import type { FakeSms } from './store';

/** A message in the form of the hosted API (version 2010-04-01): same fields, dates by RFC 2822, numbers as text. */
export function resourceOf(sms: FakeSms, accountSid: string) {
	const uri = `/2010-04-01/Accounts/${accountSid}/Messages/${sms.sid}.json`;
	return {
		account_sid: accountSid,
		api_version: '2010-04-01',
		body: sms.body,
		date_created: rfc2822(sms.createdAt),
		date_sent: sms.sentAt === null ? null : rfc2822(sms.sentAt),
		date_updated: rfc2822(sms.updatedAt),
		direction: sms.direction,
		error_code: sms.errorCode,
		error_message: null,
		from: sms.from,
		messaging_service_sid: null,
		num_media: '0',
		num_segments: String(segmentsOf(sms.body)),
		price: null,
		price_unit: 'USD',
		sid: sms.sid,
		status: sms.status,
		subresource_uris: { media: uri.replace('.json', '/Media.json') },
		to: sms.to,
		uri
	};
}

/** `Tue, 03 Mar 2026 09:15:00 +0000` */
const rfc2822 = (at: number): string => new Date(at).toUTCString().replace('GMT', '+0000');

const PLAIN = /^[\w !"#%&'()*+,\-./:;<=>?@\n\r$]*$/;

/** Plain short texts, nearly all, need no counting. */
export function segmentsOf(body: string): number {
	return body.length <= 160 && PLAIN.test(body) ? 1 : textSize(body).segments;
}
