import { segmentsOf } from '../sms-resource';
import type { FakeSms } from '../store';
import { escape, instant, linked } from './html';
import { quickAnswers } from './quick-answers';

const SHOWN = 40;

const STATUS_WORDS: Readonly<Record<string, string>> = {
	queued: 'on its way',
	sent: 'sent',
	delivered: 'arrived',
	undelivered: 'did not arrive',
	failed: 'failed',
	received: 'sent'
};

/** One telephone: its thread with the product, and a way to answer. */
export function telephoneCard(number: string, thread: readonly FakeSms[]): string {
	const shown = thread.slice(-SHOWN);
	const left = thread.length - shown.length;
	const earlier = left > 0 ? `<li class="earlier">${left} earlier</li>` : '';
	const id = `answer-${number.replace(/\D/g, '')}`;
	return `<article class="telephone" id="t${escape(number.replace(/\D/g, ''))}" aria-label="Telephone ${escape(number)}">
<header><h3 dir="ltr">${escape(readableNumber(number))}</h3></header>
<ol class="thread" tabindex="0" aria-label="Messages" data-key="thread-${escape(number)}">${earlier}${shown.map(bubble).join('')}</ol>
<form method="post" action="/answer" class="answer">
<input type="hidden" name="from" value="${escape(number)}">
<div class="quick" dir="auto">${quickAnswers(thread).map(quickButton).join('')}</div>
<div class="write"><label for="${id}">Answer as this parent</label>
<input id="${id}" name="body" autocomplete="off" dir="auto" maxlength="1600" data-key="write-${escape(number)}">
<button type="submit" name="word" value="">Send</button></div>
</form></article>`;
}

const quickButton = (word: string): string =>
	`<button type="submit" name="word" value="${escape(word)}">${escape(word)}</button>`;

function bubble(sms: FakeSms): string {
	const isParent = sms.direction === 'inbound';
	const segments = segmentsOf(sms.body);
	const parts = isParent || segments === 1 ? '' : ` · ${segments} parts`;
	const isLost = sms.status === 'undelivered' || sms.status === 'failed';
	const status = `<span class="${isLost ? 'lost' : ''}">${STATUS_WORDS[sms.status] ?? escape(sms.status)}</span>`;
	return `<li class="${isParent ? 'from-parent' : 'to-parent'}"><div class="bubble" dir="auto">${linked(sms.body)}</div>
<p class="meta">${isParent ? 'Parent · ' : ''}${instant(sms.createdAt)} · ${status}${parts}</p></li>`;
}

/** `+12025550123` becomes `+1 202 555 0123`; other numbers stay as they are. */
const readableNumber = (number: string): string =>
	number.replace(/^\+1(\d{3})(\d{3})(\d{4})$/, '+1 $1 $2 $3');
