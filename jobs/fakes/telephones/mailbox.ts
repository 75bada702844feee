import type { FakeAttachment, FakeMail } from '../store';
import { calendarCard } from './calendar';
import { escape, instant, linked } from './html';

const SHOWN = 15;

/** One mailbox, newest mail first. */
export function mailboxCard(address: string, mails: readonly FakeMail[]): string {
	const shown = mails.slice(-SHOWN).reverse();
	const left = mails.length - shown.length;
	const earlier = left > 0 ? `<p class="earlier">${left} earlier</p>` : '';
	return `<article class="mailbox" aria-label="Mailbox ${escape(address)}">
<header><h3 dir="ltr">${escape(address)}</h3></header>
${shown.map(letter).join('')}${earlier}</article>`;
}

function letter(mail: FakeMail, index: number): string {
	const asSent =
		mail.html === null
			? ''
			: `<details data-key="html-${mail.id}"><summary>As the mail program shows it</summary>
<iframe title="Mail as sent" src="/mails/${mail.id}/html" loading="lazy"></iframe></details>`;
	return `<details class="letter" data-key="mail-${mail.id}"${index === 0 ? ' open' : ''}>
<summary><span class="subject" dir="auto">${escape(mail.subject)}</span><span class="meta">${instant(mail.at)}</span></summary>
<p class="meta">From <bdi>${escape(mail.from)}</bdi></p>
<div class="letter-text" dir="auto">${linked(mail.text.trim())}</div>
${mail.attachments.map((one, number) => attachment(mail, one, number)).join('')}${asSent}</details>`;
}

function attachment(mail: FakeMail, one: FakeAttachment, number: number): string {
	const href = `/mails/${mail.id}/attachments/${number}`;
	if (one.contentType.startsWith('text/calendar') || one.filename.endsWith('.ics')) {
		return calendarCard(Buffer.from(one.base64, 'base64').toString('utf8'), href, one.filename);
	}
	return `<p><a href="${href}" download="${escape(one.filename)}">Save ${escape(one.filename)}</a></p>`;
}
