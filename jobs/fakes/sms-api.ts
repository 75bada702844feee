import { randomBytes, timingSafeEqual } from 'node:crypto';
import type { IncomingMessage, ServerResponse } from 'node:http';
import { after, readForm, sendJson } from './http';
import type { Reports } from './reports';
import type { FakesSettings } from './settings';
import { resourceOf } from './sms-resource';
import type { FakeSms, Store } from './store';
import type { Met, SmsTrouble, Troubles } from './troubles';

export interface SmsApiParts {
	readonly settings: FakesSettings;
	readonly store: Store;
	readonly troubles: Troubles;
	readonly reports: Reports;
}

const PATH = /^\/2010-04-01\/Accounts\/(AC[0-9a-f]{32})\/Messages(?:\/(SM[0-9a-f]{32}))?\.json$/;

/** Answers a request to the hosted API's paths; false when it is none. */
export async function answerSmsApi(
	parts: SmsApiParts,
	{ request, response, url }: { request: IncomingMessage; response: ServerResponse; url: URL }
): Promise<boolean> {
	const match = PATH.exec(url.pathname);
	if (match === null) return false;
	const [, account, sid] = match;
	if (!isAuthentic(request.headers.authorization, parts.settings) || account !== parts.settings.accountSid) {
		refuse(response, 401, 20003, 'Authenticate');
	} else if (sid !== undefined) fetchOne(parts, response, sid);
	else if (request.method === 'POST') await create(parts, response, await readForm(request));
	else if (request.method === 'GET') list(parts, response, url);
	else refuse(response, 405, 20004, 'Method not allowed');
	return true;
}

function isAuthentic(header: string | undefined, { accountSid, authToken }: FakesSettings): boolean {
	const expected = Buffer.from(`Basic ${Buffer.from(`${accountSid}:${authToken}`).toString('base64')}`);
	const given = Buffer.from(header ?? '');
	return given.length === expected.length && timingSafeEqual(given, expected);
}

function refuse(
	response: ServerResponse,
	status: number,
	code: number,
	message: string,
	headers?: Record<string, string>
): void {
	const more_info = `https://www.twilio.com/docs/errors/${code}`;
	sendJson(response, status, { code, message, more_info, status }, headers);
}

async function create(parts: SmsApiParts, response: ServerResponse, form: URLSearchParams): Promise<void> {
	const to = form.get('To') ?? '';
	const body = form.get('Body') ?? '';
	if (to === '') return refuse(response, 400, 21604, "A 'To' phone number is required.");
	if (!form.get('From')) return refuse(response, 400, 21603, "A 'From' phone number is required.");
	if (body === '') return refuse(response, 400, 21602, 'Message body is required.');
	if (body.length > 1600)
		return refuse(response, 400, 21617, 'The concatenated message body exceeds 1600 characters.');
	if (!/^\+[1-9]\d{6,14}$/.test(to)) return refuseNumber(response);
	const trouble = parts.troubles.forSms(to);
	if (trouble !== null && refuseFor(response, trouble)) return;
	if (trouble?.kind === 'late-taken') await after(trouble.seconds);
	const sms = take(parts, form, trouble);
	parts.reports.schedule(sms, trouble?.kind ?? null);
	await answer(parts, response, sms, trouble);
}

const refuseNumber = (response: ServerResponse) =>
	refuse(response, 400, 21211, "The 'To' number is not a valid phone number.");

/** Troubles in which the message is not taken. */
function refuseFor(response: ServerResponse, { kind, seconds }: Met<SmsTrouble>): boolean {
	if (kind === 'too-many')
		refuse(response, 429, 20429, 'Too Many Requests', { 'retry-after': String(seconds) });
	else if (kind === 'server-error') refuse(response, 500, 20500, 'Internal Server Error');
	else if (kind === 'invalid') refuseNumber(response);
	else if (kind === 'stopped') refuse(response, 400, 21610, 'Attempt to send to unsubscribed recipient');
	else if (kind === 'not-mobile') refuse(response, 400, 21614, "'To' number is not a valid mobile number");
	else return false;
	return true;
}

function take({ store }: SmsApiParts, form: URLSearchParams, trouble: Met<SmsTrouble> | null): FakeSms {
	const now = Date.now();
	const isHidden = trouble?.kind === 'hidden' || trouble?.kind === 'hidden-cut';
	const sms: FakeSms = {
		sid: `SM${randomBytes(16).toString('hex')}`,
		direction: 'outbound-api',
		from: form.get('From') ?? '',
		to: form.get('To') ?? '',
		body: form.get('Body') ?? '',
		statusCallback: form.get('StatusCallback'),
		createdAt: now,
		listedAt: isHidden ? now + trouble.seconds * 1000 : now,
		status: 'queued',
		errorCode: null,
		sentAt: null,
		updatedAt: now
	};
	store.addSms(sms);
	return sms;
}

async function answer(
	{ settings }: SmsApiParts,
	response: ServerResponse,
	sms: FakeSms,
	trouble: Met<SmsTrouble> | null
): Promise<void> {
	const kind = trouble?.kind;
	if (kind === 'cut' || kind === 'hidden-cut' || kind === 'late-taken') {
		response.destroy();
		return;
	}
	if (settings.latencyMilliseconds > 0) await after((Math.random() * settings.latencyMilliseconds) / 1000);
	if (trouble !== null && (kind === 'slow' || kind === 'silent')) await after(trouble.seconds);
	if (kind === 'silent') response.destroy();
	else if (kind === 'server-error-taken') refuse(response, 500, 20500, 'Internal Server Error');
	else sendJson(response, 201, resourceOf(sms, settings.accountSid));
}

function fetchOne({ store, settings }: SmsApiParts, response: ServerResponse, sid: string): void {
	const sms = store.findSms(sid);
	if (sms === undefined) refuse(response, 404, 20404, `The requested resource ${sid} was not found`);
	else sendJson(response, 200, resourceOf(sms, settings.accountSid));
}

/** The newest first. The filter by time leaves out what was not sent yet, as the hosted list may. */
function list({ store, settings }: SmsApiParts, response: ServerResponse, url: URL): void {
	const get = (name: string) => url.searchParams.get(name);
	const size = Math.min(Math.max(Number(get('PageSize') ?? 50), 1), 1000);
	const page = Number(get('Page') ?? 0);
	const to = get('To');
	const after = get('DateSent>');
	const before = get('DateSent<');
	const now = Date.now();
	const found = [...(to === null ? store.smses : store.smsesOf(to))]
		.filter((sms) => sms.listedAt <= now && (to === null || sms.to === to))
		.filter((sms) => get('From') === null || sms.from === get('From'))
		.filter((sms) => after === null || (sms.sentAt !== null && sms.sentAt >= Date.parse(after)))
		.filter((sms) => before === null || (sms.sentAt !== null && sms.sentAt <= Date.parse(before)))
		.reverse();
	const shown = found.slice(page * size, (page + 1) * size);
	const pageUri = (number: number) => {
		const query = new URLSearchParams(url.searchParams);
		query.set('Page', String(number));
		query.set('PageSize', String(size));
		return `${url.pathname}?${query}`;
	};
	sendJson(response, 200, {
		messages: shown.map((sms) => resourceOf(sms, settings.accountSid)),
		start: page * size,
		end: page * size + Math.max(0, shown.length - 1),
		page,
		page_size: size,
		first_page_uri: pageUri(0),
		next_page_uri: (page + 1) * size < found.length ? pageUri(page + 1) : null,
		previous_page_uri: page > 0 ? pageUri(page - 1) : null,
		uri: pageUri(page)
	});
}
