import { whyNoLonger } from '../../domain/messaging/holds';
import type { MessageKind } from '../../domain/messaging/kinds';
import { isExemptFromQuiet, isQuiet, nextAllowed } from '../../domain/messaging/quiet-hours';
import { mailReferenceOf, smsReferenceOf, smsReferenceSuffix } from '../../domain/messaging/reference';
import { render, type FieldValues } from '../../domain/messaging/template';
import type { CheckInResult } from '../../domain/guideline/types';
import type { Ctx } from '../context';
import type { Reader } from '../db/client';
import type { RenderedMessage } from '../outbox/port';
import type { MailAttachment } from '../providers/mail/port';
import type { MessageRow } from '../repos/messages';
import type { TemplateRow } from '../repos/templates';
import { fieldValues } from '../wording/field-values';
import { mailHtml } from '../wording/mail-html';
import { visitInvitation } from './calendar-objects';
import { loadMessageFacts, type MessageFacts } from './message-batch';
import { canMail, canSms } from './message-plan';

/** These answer a text of the family's own: a channel that was stopped a moment ago still carries them. */
const ANSWERS: readonly MessageKind[] = [
	'stop-answer',
	'start-answer',
	'help-answer',
	'which-newborn',
	'emergency-advice'
];

/**
 * Checks messages against their follow-ups as they are now, and renders what still holds. Reads only, and with a fixed
 * number of queries however many messages there are. A message that cannot be rendered at all (no wording, a field without
 * a value) is absent from the answer, so that the caller counts it as failed and somebody is told.
 */
export async function renderForSending(
	db: Reader,
	ctx: Ctx,
	messages: readonly MessageRow[]
): Promise<Map<string, RenderedMessage>> {
	const results = new Map<string, RenderedMessage>();
	for (const facts of await loadMessageFacts(db, ctx, messages)) {
		const result = notNow(facts, ctx.clock.now()) ?? rendered(ctx, facts);
		if (result !== null) results.set(facts.message.id, result);
		else
			ctx.log.error(
				{ messageId: facts.message.id, kind: facts.message.kind },
				'a message has no usable wording'
			);
	}
	return results;
}

function notNow(facts: MessageFacts, now: Date): RenderedMessage | null {
	const { message, holds, site } = facts;
	const reason =
		(holds && whyNoLonger(message.kind, holds, now)) ?? (address(facts) === null ? 'channel closed' : null);
	if (reason !== null) return { kind: 'withdraw', reason };
	if (isExemptFromQuiet(message.priority)) return null;
	const quiet = { timeZone: site.timeZone, ...site.policy };
	return isQuiet(now, quiet)
		? { kind: 'postpone', until: nextAllowed(now, quiet), reason: 'quiet hours' }
		: null;
}

/** Where the message goes, if the channel is open to us. */
function address({ message, carer, site, strayPhone }: MessageFacts): string | null {
	if (message.kind === 'duty-finding') return site.dutyEmail;
	if (carer === null) return message.channel === 'sms' && ANSWERS.includes(message.kind) ? strayPhone : null;
	if (message.channel === 'mail') return canMail(carer) ? carer.email : null;
	return canSms(carer) || ANSWERS.includes(message.kind) ? carer.phone : null;
}

const RESULTS: readonly CheckInResult[] = ['emergency', 'today', 'call-back', 'as-planned'];

/** Values of all fields that the message's facts allow. */
export function valuesOf(ctx: Ctx, facts: MessageFacts): FieldValues {
	const { message, visit, site, strayPhone } = facts;
	return fieldValues({
		language: message.language,
		channel: message.channel,
		// Whose clinic an unknown number means is not known: the organisation speaks, with the telephones of this clinic.
		clinic: strayPhone === null ? site : { ...site, name: facts.organisationName },
		emergencyNumber: facts.emergencyNumber,
		link: facts.link,
		visit: visit ? { startsAt: visit.startsAt, isConfirmed: visit.state === 'confirmed' } : undefined,
		checkInResult: RESULTS.find((result) => result === message.facts.result),
		words: facts.words,
		choices: facts.choices,
		finding: message.facts.finding,
		operations: `${ctx.config.origin}/operations`
	});
}

function rendered(ctx: Ctx, facts: MessageFacts): RenderedMessage | null {
	const { message, template } = facts;
	const to = address(facts);
	if (template === null || to === null) return null;
	const texts = renderTemplate(template, valuesOf(ctx, facts));
	if (texts === null) return null;
	if (message.channel === 'sms') {
		const text = texts.body + smsReferenceSuffix(message.id);
		return { kind: 'send', to, templateId: template.id, text, reference: smsReferenceOf(message.id) };
	}
	const invitation = invitationOf(ctx, facts, to);
	return {
		kind: 'send',
		to,
		templateId: template.id,
		subject: texts.subject,
		text: texts.body,
		html: mailHtml(texts.body, message.language),
		...(invitation ? { attachments: [invitation] } : {}),
		reference: mailReferenceOf(message.id, ctx.config.mail.from)
	};
}

/** A wording with its values in place; null where a field has none. */
export function renderTemplate(
	template: Pick<TemplateRow, 'subject' | 'body'>,
	values: FieldValues
): { subject: string; body: string } | null {
	const body = render(template.body, values);
	const subject = render(template.subject ?? '', values);
	return body.ok && subject.ok ? { subject: subject.value, body: body.value } : null;
}

const WITH_INVITATION: readonly MessageKind[] = ['visit-booked', 'visit-moved', 'visit-cancelled'];

function invitationOf(
	ctx: Ctx,
	{ message, visit, site, link }: MessageFacts,
	to: string
): MailAttachment | null {
	if (visit === null || !WITH_INVITATION.includes(message.kind)) return null;
	const email = /<([^>]+)>/.exec(ctx.config.mail.from)?.[1] ?? ctx.config.mail.from;
	const { method, content } = visitInvitation({
		visit: {
			uid: visit.calendarUid,
			sequence: visit.calendarSequence,
			startsAt: visit.startsAt,
			endsAt: visit.endsAt,
			isCancelled: visit.state === 'cancelled',
			title: site.name,
			place: site.address,
			url: link
		},
		from: { name: site.name, email },
		to,
		now: ctx.clock.now()
	});
	return {
		filename: 'visit.ics',
		content,
		contentType: `text/calendar; charset=utf-8; method=${method}`,
		method
	};
}
