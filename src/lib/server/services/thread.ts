import { can, type Resource } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import type { CheckInResult } from '../../domain/guideline/types';
import type { Channel } from '../../domain/messaging/kinds';
import { err, ok, type Result } from '../../domain/result';
import { formatPhone } from '../../format/phone';
import type { ThreadCarer, ThreadLine, ThreadView } from '../../schemas/thread';
import type { Ctx } from '../context';
import { notFound, type AppError } from '../errors';
import type { MessageRow } from '../repos/messages';
import { findSite } from '../repos/sites';
import { listTemplatesByIds } from '../repos/templates';
import { findThreadHead, listThread, listThreadMessages } from '../repos/thread';
import { loadMessageFacts } from './message-batch';
import { renderTemplate, valuesOf } from './message-content';
import { canMail, canSms } from './message-plan';

type Head = NonNullable<Awaited<ReturnType<typeof findThreadHead>>>;
type EntryRow = Awaited<ReturnType<typeof listThread>>[number];

/** The sites and organisation against which access to a thread is decided. */
export const threadResource = ({ followUp, newborn }: Head): Resource => ({
	organisationId: newborn.organisationId,
	birthSiteId: followUp.birthSiteId,
	clinicId: followUp.clinicId
});

/** The thread with a family: what came in, what staff wrote, what the program sent, and what it will send. Reads only. */
export async function getThread(
	ctx: Ctx,
	actor: StaffActor,
	followUpId: string
): Promise<Result<ThreadView, AppError>> {
	const head = await findThreadHead(ctx.db, followUpId);
	if (head === null || !can(actor, 'thread.view', threadResource(head))) return err(notFound);
	const clinic = await findSite(ctx.db, actor.organisationId, head.followUp.clinicId);
	if (clinic === null) return err(notFound);
	const phones = head.carers.flatMap(({ phone }) => (phone === null ? [] : [phone]));
	const entries = await listThread(ctx.db, followUpId, phones);
	const messages = await listThreadMessages(ctx.db, followUpId);
	const incoming = entries
		.filter(({ entry }) => entry.direction === 'in')
		.map((row) => familyLine(row, head));
	const outgoing = await clinicLines(ctx, { head, entries, messages });
	const isWaiting = (line: ThreadLine): boolean => line.from === 'clinic' && line.state === 'planned';
	return ok({
		followUpId,
		newbornName: `${head.newborn.familyName}, ${head.newborn.givenName}`,
		recordNumber: head.newborn.recordNumber,
		clinicName: clinic.name,
		timeZone: clinic.timeZone,
		isClosed: head.followUp.stage === 'closed',
		now: ctx.clock.now(),
		carers: head.carers.map(threadCarer),
		lines: inTime([...incoming, ...outgoing.filter((line) => !isWaiting(line))]),
		planned: inTime(outgoing.filter(isWaiting)),
		unread: incoming.filter((line) => line.from === 'family' && line.isUnread).length,
		mayWrite: can(actor, 'thread.write', threadResource(head))
	});
}

const incomingFirst = (line: ThreadLine): number => (line.from === 'family' ? 0 : 1);

/** In the order of time; an answer of the same millisecond stands after the words it answers. */
const inTime = (lines: readonly ThreadLine[]): ThreadLine[] =>
	[...lines].sort(
		(a, b) => a.at.getTime() - b.at.getTime() || incomingFirst(a) - incomingFirst(b) || (a.id < b.id ? -1 : 1)
	);

function threadCarer(carer: Head['carers'][number]): ThreadCarer {
	const channels: Channel[] = [];
	if (canSms(carer)) channels.push('sms');
	if (canMail(carer)) channels.push('mail');
	const { id, name, relation, phone, email, language, smsStoppedAt } = carer;
	return { id, name, relation, phone, email, language, channels, smsStoppedAt };
}

function familyLine({ entry, carerName }: EntryRow, head: Head): ThreadLine {
	const ofNumber = head.carers.find(({ phone }) => phone === entry.phone);
	return {
		id: entry.id,
		at: entry.at,
		from: 'family',
		// Of a number that is nobody's on record, the number is all that there is to call back.
		who: carerName ?? ofNumber?.name ?? (entry.phone === null ? null : formatPhone(entry.phone)),
		words: entry.body,
		language: ofNumber?.language ?? null,
		understoodAs: entry.understoodAs,
		isAlarming: entry.isAlarming,
		isUnread: entry.readAt === null,
		isUnassigned: entry.followUpId === null
	};
}

interface Outgoing {
	readonly head: Head;
	readonly entries: readonly EntryRow[];
	readonly messages: readonly MessageRow[];
}

const RESULTS: readonly CheckInResult[] = ['emergency', 'today', 'call-back', 'as-planned'];

async function clinicLines(ctx: Ctx, { head, entries, messages }: Outgoing): Promise<ThreadLine[]> {
	const facts = await loadMessageFacts(ctx.db, ctx, messages);
	const used = await listTemplatesByIds(
		ctx.db,
		messages.flatMap(({ templateId }) => (templateId === null ? [] : [templateId]))
	);
	return facts.map((one): ThreadLine => {
		const { message } = one;
		// What was sent is shown in the version that was sent; what waits, in the one in use.
		const template = used.find(({ id }) => id === message.templateId) ?? one.template;
		const texts = template && renderTemplate(template, valuesOf(ctx, one));
		const written = entries.find(({ entry }) => entry.id === message.facts.threadEntryId);
		return {
			id: message.id,
			at: message.sentAt ?? message.runAt,
			from: 'clinic',
			by: written?.staffName ?? null,
			to: head.carers.find(({ id }) => id === message.carerId)?.name ?? null,
			kind: message.kind,
			channel: message.channel,
			language: message.language,
			state: message.state,
			delivery: message.delivery,
			result: RESULTS.find((result) => result === message.facts.result) ?? null,
			words: texts?.body ?? written?.entry.body ?? null,
			isDraftWording: template?.standing === 'draft' && message.kind !== 'desk-words'
		};
	});
}
