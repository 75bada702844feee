import type { Store } from '../store';
import { MAIL_TROUBLES, SMS_TROUBLES, type Troubles } from '../troubles';
import { escape } from './html';
import { mailboxCard } from './mailbox';
import { telephoneCard } from './telephone';

const SHOWN = 24;

export interface View {
	/** Part of a number or an address; empty for all. */
	readonly find: string;
}

export function page(store: Store, troubles: Troubles, view: View, remark: string): string {
	return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark">
<title>The parents' telephones</title>
<link rel="stylesheet" href="/telephones.css">
<script src="/telephones.js" defer></script>
</head>
<body>
<header class="top"><div class="ruler" aria-hidden="true"></div>
<h1>The parents' telephones</h1>
<p>Every message that was sent on this machine, as a family sees it. Answer as the parent would. Nothing here leaves the machine.</p>
<form class="find" method="get" action="/"><label for="find">Number or address</label>
<input id="find" name="find" type="search" value="${escape(view.find)}" data-key="find"><button type="submit">Find</button></form>
<p class="remark" role="status">${escape(remark)}</p>
</header>
<main id="wall" data-version="${store.version}" data-find="${escape(view.find)}">${wall(store, view)}</main>
${troublePanel(troubles)}
</body>
</html>`;
}

/** The telephones and mailboxes, those with the latest news first. */
export function wall(store: Store, { find }: View): string {
	const telephones = recentTelephones(store, find);
	const mailboxes = recentMailboxes(store, find);
	if (telephones.length + mailboxes.length === 0) return nothing(find);
	return `${section('Text messages', 'telephones', telephones)}${section('Mail', 'mailboxes', mailboxes)}`;
}

function nothing(find: string): string {
	return find === ''
		? '<p class="nothing">No message was sent yet. Make a visit for a newborn, and the confirmation arrives here within seconds.</p>'
		: `<p class="nothing">Nothing for “${escape(find)}”. <a href="/">Show all</a></p>`;
}

function section(title: string, name: string, cards: readonly string[]): string {
	if (cards.length === 0) return '';
	const shown = cards.slice(0, SHOWN);
	const left = cards.length - shown.length;
	const rest =
		left > 0
			? `<p class="earlier">${left} more with older messages: find them by number or address.</p>`
			: '';
	return `<section aria-labelledby="${name}-title"><h2 class="section-title" id="${name}-title">${title}</h2>
<div class="${name}">${shown.join('')}</div>${rest}</section>`;
}

function recentTelephones(store: Store, find: string): string[] {
	const wanted = find.replace(/[^\d+@a-z.]/gi, '');
	return store.telephones
		.filter((number) => number.includes(wanted))
		.map((number) => ({ number, thread: store.smsesOf(number) }))
		.sort((a, b) => (b.thread.at(-1)?.createdAt ?? 0) - (a.thread.at(-1)?.createdAt ?? 0))
		.map(({ number, thread }, index) => (index < SHOWN ? telephoneCard(number, thread) : ''));
}

function recentMailboxes(store: Store, find: string): string[] {
	const byAddress = new Map<string, typeof store.mails>();
	for (const mail of store.mails) {
		if (!mail.to.includes(find.trim().toLowerCase())) continue;
		const box = byAddress.get(mail.to);
		if (box === undefined) byAddress.set(mail.to, [mail]);
		else box.push(mail);
	}
	return [...byAddress]
		.sort(([, a], [, b]) => (b.at(-1)?.at ?? 0) - (a.at(-1)?.at ?? 0))
		.map(([address, mails], index) => (index < SHOWN ? mailboxCard(address, mails) : ''));
}

function troublePanel(troubles: Troubles): string {
	const options = (channel: string, kinds: readonly string[]) =>
		kinds
			.map(
				(kind) => `<option value="${channel}:${kind}">${channel === 'sms' ? 'SMS' : 'Mail'}: ${kind}</option>`
			)
			.join('');
	const open = troubles.open
		.map(
			({ channel, kind, times, to }) =>
				`<li>${channel} ${kind}, ${times} more${to ? ` to ${escape(to)}` : ''}</li>`
		)
		.join('');
	return `<details class="troubles" data-key="troubles"><summary>Let something go wrong</summary>
<form method="post" action="/trouble"><label>What <select name="kind">${options('sms', SMS_TROUBLES)}${options('mail', MAIL_TROUBLES)}</select></label>
<label>Times <input name="times" type="number" min="1" max="999" value="1"></label>
<label>Seconds <input name="seconds" type="number" min="0" max="120" value="5"></label>
<button type="submit">Order</button></form><ul>${open}</ul></details>`;
}
