import { readFile } from 'node:fs/promises';
import type { IncomingMessage, ServerResponse } from 'node:http';
import { createRequire } from 'node:module';
import { fileURLToPath } from 'node:url';
import { readForm, sendText } from '../http';
import type { Reports } from '../reports';
import type { FakeMail, Store } from '../store';
import { troubleOrder, type Troubles } from '../troubles';
import { page, wall } from './page';

export interface TelephoneParts {
	readonly store: Store;
	readonly troubles: Troubles;
	readonly reports: Reports;
}

interface Call {
	readonly request: IncomingMessage;
	readonly response: ServerResponse;
	readonly url: URL;
}

const HTML = 'text/html; charset=utf-8';
const PAGE_POLICY =
	"default-src 'none'; style-src 'self'; script-src 'self'; font-src 'self'; connect-src 'self'; frame-src 'self'; form-action 'self'; base-uri 'none'; frame-ancestors 'none'";
/** A mail is foreign matter: no script, no forms, nothing loaded from elsewhere; its links open beside the page. */
const MAIL_POLICY =
	"sandbox allow-popups allow-popups-to-escape-sandbox; default-src 'none'; style-src 'unsafe-inline'; img-src data:";

const require = createRequire(import.meta.url);
const FILES: Readonly<Record<string, { readonly path: string; readonly type: string }>> = {
	'/telephones.css': { path: here('telephones.css'), type: 'text/css; charset=utf-8' },
	'/telephones.js': { path: here('telephones.mjs'), type: 'text/javascript; charset=utf-8' },
	'/plain.woff2': {
		path: require.resolve('@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-wght-normal.woff2'),
		type: 'font/woff2'
	},
	'/title.woff2': {
		path: require.resolve('@fontsource-variable/literata/files/literata-latin-wght-normal.woff2'),
		type: 'font/woff2'
	}
};

function here(name: string): string {
	return fileURLToPath(new URL(name, import.meta.url));
}

/** Answers the page "the parents' telephones" and what belongs to it; false for any other path. */
export async function answerTelephones(parts: TelephoneParts, call: Call): Promise<boolean> {
	const { request, response, url } = call;
	const file = FILES[url.pathname];
	if (file !== undefined) sendText(response, 200, file.type, await readFile(file.path));
	else if (url.pathname === '/') showPage(parts, call);
	else if (url.pathname === '/wall') showNews(parts, call);
	else if (url.pathname === '/answer' && request.method === 'POST') await answerAsParent(parts, call);
	else if (url.pathname === '/trouble' && request.method === 'POST') await orderTrouble(parts, call);
	else return showMailPart(parts.store, call);
	return true;
}

function showPage({ store, troubles }: TelephoneParts, { response, url }: Call): void {
	response.setHeader('content-security-policy', PAGE_POLICY);
	const view = { find: url.searchParams.get('find') ?? '' };
	sendText(response, 200, HTML, page(store, troubles, view, url.searchParams.get('remark') ?? ''));
}

/** The wall again if anything changed since the version that the page shows. */
function showNews({ store }: TelephoneParts, { response, url }: Call): void {
	response.setHeader('x-version', String(store.version));
	if (url.searchParams.get('version') === String(store.version)) {
		response.writeHead(204).end();
		return;
	}
	sendText(response, 200, HTML, wall(store, { find: url.searchParams.get('find') ?? '' }));
}

async function answerAsParent({ reports }: TelephoneParts, { request, response }: Call): Promise<void> {
	const form = await readForm(request);
	const from = form.get('from') ?? '';
	const body = (form.get('word') || form.get('body') || '').trim();
	if (!/^\+\d{6,15}$/.test(from) || body === '') return back(response, 'Write something first.');
	const status = await reports.receive(from, body);
	if (status === null)
		return back(response, 'The product could not be reached; the answer is lost, as it would be.');
	back(response, status < 300 ? 'Sent.' : `The product answered ${status}.`);
}

async function orderTrouble({ troubles }: TelephoneParts, { request, response }: Call): Promise<void> {
	const form = await readForm(request);
	const [channel, kind] = (form.get('kind') ?? '').split(':');
	const seconds = Number(form.get('seconds'));
	const order = troubleOrder.safeParse({ channel, kind, seconds, times: Number(form.get('times')) });
	if (order.success) troubles.order(order.data);
	back(response, order.success ? 'Ordered.' : 'That could not be ordered.');
}

function back(response: ServerResponse, remark: string): void {
	response.writeHead(303, { location: `/?remark=${encodeURIComponent(remark)}` }).end();
}

function showMailPart(store: Store, { response, url }: Call): boolean {
	const match = /^\/mails\/([0-9a-f]+)\/(?:html|attachments\/(\d+))$/.exec(url.pathname);
	if (match === null) return false;
	const mail = store.mails.find(({ id }) => id === match[1]);
	if (mail === undefined) return false;
	return match[2] === undefined ? showHtml(mail, response) : showAttachment(mail, Number(match[2]), response);
}

function showHtml(mail: FakeMail, response: ServerResponse): boolean {
	response.setHeader('content-security-policy', MAIL_POLICY);
	sendText(response, 200, HTML, `<base target="_blank">${mail.html ?? ''}`);
	return true;
}

function showAttachment(mail: FakeMail, number: number, response: ServerResponse): boolean {
	const attachment = mail.attachments[number];
	if (attachment === undefined) return false;
	const name = encodeURIComponent(attachment.filename);
	response.setHeader('content-disposition', `attachment; filename*=UTF-8''${name}`);
	response.setHeader('x-content-type-options', 'nosniff');
	sendText(response, 200, attachment.contentType, Buffer.from(attachment.base64, 'base64'));
	return true;
}
