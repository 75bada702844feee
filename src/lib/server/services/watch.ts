import { OPENS_AFTER } from '../../domain/messaging/breaker';
import { isStrayBeyond, strayPriority } from '../../domain/messaging/stray';
import type { FindingKind } from '../../domain/followup/finding';
import { ALERT_WORDS, NEXT_STEP_WORDS } from '../../format/words';
import type { Ctx } from '../context';
import type { Reader, Tx } from '../db/client';
import { withTx } from '../db/tx';
import { insertMessages } from '../repos/messages';
import { listStraysDueBy } from '../repos/stray-texts';
import {
	countStuck,
	insertFindings,
	listAlertsBeyond,
	listBrokenSenders,
	listDutyAddresses,
	listOpenFindingRows,
	listSilentWorkers,
	listStepsBeyond,
	listTroubledTicks,
	listWithoutNextStep,
	settleFindings
} from '../repos/watch';

/** Something that is owed by nobody, or not moving. */
interface Finding {
	readonly kind: FindingKind;
	readonly subject: string;
	/** Null where it concerns every site. */
	readonly siteId: string | null;
	/** No names, no numbers. */
	readonly detail: string;
}

/** Two people above the role, one more round, and one of grace. */
const CLIMBS_BEFORE_WATCH = 4;
const MOST_STRAYS = 500;
const MAIL_HOURS = 12;
const MAIL_LINES = 12;
const HOUR = 3_600_000;

/**
 * The watch: looks for anything owed by nobody, writes down what is new, settles what is over, and tells the duty address of
 * the site by mail. The findings are on the operations screen, in the health answer and in the log.
 * Returns the number of open findings.
 */
export async function watch(ctx: Ctx): Promise<number> {
	const found = await look(ctx.db, ctx.clock.now());
	return withTx(ctx.db, async (tx) => {
		const open = await listOpenFindingRows(tx);
		const isOpen = new Set(open.map(keyOf));
		const isFound = new Set(found.map(keyOf));
		const now = ctx.clock.now();
		const over = open.filter((row) => !isFound.has(keyOf(row))).map(({ id }) => id);
		const news = found.filter((one) => !isOpen.has(keyOf(one)));
		await settleFindings(tx, over, now);
		const rows = news.map((one) => ({ ...one, id: ctx.random.id(), foundAt: now, mailedAt: now }));
		await insertFindings(tx, rows);
		await mailDuty(tx, ctx, rows);
		for (const one of news) ctx.log.warn({ finding: one.kind, subject: one.subject }, one.detail);
		return found.length;
	});
}

const keyOf = ({ kind, subject }: { readonly kind: string; readonly subject: string }): string =>
	`${kind} ${subject}`;

async function look(db: Reader, now: Date): Promise<Finding[]> {
	const found = [
		...(await lookAtFollowUps(db, now)),
		...(await lookAtStrays(db, now)),
		...(await lookAtMessages(db, now)),
		...(await lookAtMachinery(db, now))
	];
	return found.map((one) => ({ ...one, detail: one.detail.slice(0, 300) }));
}

async function lookAtFollowUps(db: Reader, now: Date): Promise<Finding[]> {
	const none = (await listWithoutNextStep(db)).map(({ id, siteId }): Finding => ({
		kind: 'no-next-step',
		subject: id,
		siteId,
		detail: 'An open follow-up has no next step.'
	}));
	const steps = (await listStepsBeyond(db, now, CLIMBS_BEFORE_WATCH)).map(
		({ id, siteId, what, dueAt }): Finding => ({
			kind: 'step-overdue',
			subject: id,
			siteId,
			detail: `“${what ? NEXT_STEP_WORDS[what] : 'Next step'}” of a follow-up was due ${stamp(dueAt)} and nobody has taken it.`
		})
	);
	const alerts = (await listAlertsBeyond(db, now, CLIMBS_BEFORE_WATCH)).map(
		({ id, siteId, what, dueAt }): Finding => ({
			kind: 'alert-overdue',
			subject: id,
			siteId,
			detail: `“${ALERT_WORDS[what]}” was due ${stamp(dueAt)} and nobody has settled it.`
		})
	);
	return [...none, ...steps, ...alerts];
}

/** A text of an unknown number has no site and climbs to nobody: its mail goes to every duty address. */
async function lookAtStrays(db: Reader, now: Date): Promise<Finding[]> {
	const overdue = (await listStraysDueBy(db, now, MOST_STRAYS)).map((row) => ({
		...row,
		isAlarming: row.priority === strayPriority(true)
	}));
	return overdue
		.filter((one) => isStrayBeyond(one, now))
		.map(({ entryId, dueAt, isAlarming }): Finding => ({
			kind: 'stray-text-overdue',
			subject: entryId,
			siteId: null,
			detail:
				`A text from a number of no family${isAlarming ? ', with alarming words,' : ''} was to be read by ` +
				`${stamp(dueAt)} and nobody has dealt with it. It stands above the desk's queue.`
		}));
}

async function lookAtMessages(db: Reader, now: Date): Promise<Finding[]> {
	return (await countStuck(db, now)).map(({ siteId, count, oldestAt }): Finding => ({
		kind: 'messages-stuck',
		subject: siteId,
		siteId,
		detail: `${count === 1 ? 'One message does' : `${count} messages do`} not move, the oldest since ${stamp(oldestAt)}.`
	}));
}

async function lookAtMachinery(db: Reader, now: Date): Promise<Finding[]> {
	const workers = (await listSilentWorkers(db, now)).map(({ id, heardAt }): Finding => ({
		kind: 'worker-silent',
		subject: id,
		siteId: null,
		detail: `Worker ${id} was last heard from ${stamp(heardAt)} and did not sign off.`
	}));
	const ticks = (await listTroubledTicks(db, now)).map(({ name, lastRunAt, lastError }): Finding => ({
		kind: 'tick-troubled',
		subject: name,
		siteId: null,
		detail: `The periodic job "${name}" last ran ${stamp(lastRunAt)}${lastError === null ? '' : ' and failed'}.`
	}));
	const senders = (await listBrokenSenders(db, OPENS_AFTER)).map(({ id }): Finding => ({
		kind: 'sender-broken',
		subject: id,
		siteId: null,
		detail: `The ${id === 'sms' ? 'SMS' : 'mail'} service does not take messages at present.`
	}));
	return [...workers, ...ticks, ...senders];
}

/** UTC, so that one line means the same at every site. */
const stamp = (at: Date | null): string =>
	at === null ? 'long ago' : `${at.toISOString().slice(0, 16).replace('T', ' ')} UTC`;

/** One mail to each duty address that a new finding concerns. */
async function mailDuty(
	tx: Tx,
	ctx: Ctx,
	news: readonly (Finding & { readonly id: string })[]
): Promise<void> {
	if (news.length === 0) return;
	const now = ctx.clock.now();
	const told = new Set<string>();
	for (const { id: siteId, dutyEmail } of await listDutyAddresses(tx)) {
		const theirs = news.filter((one) => one.siteId === null || one.siteId === siteId);
		const [first] = theirs;
		const isOnlyGeneral = theirs.every((one) => one.siteId === null);
		if (first === undefined || (isOnlyGeneral && told.has(dutyEmail))) continue;
		told.add(dutyEmail);
		await insertMessages(tx, [
			{
				id: ctx.random.id(),
				siteId,
				kind: 'duty-finding',
				occasion: first.id,
				channel: 'mail',
				language: 'en',
				dedupeKey: `duty:${siteId}:${first.id}`,
				facts: { finding: linesOf(theirs) },
				state: 'planned',
				priority: 1,
				runAt: now,
				expiresAt: new Date(now.getTime() + MAIL_HOURS * HOUR),
				createdAt: now,
				updatedAt: now
			}
		]);
	}
}

function linesOf(findings: readonly Finding[]): string {
	const lines = findings.slice(0, MAIL_LINES).map(({ detail }) => detail);
	const left = findings.length - lines.length;
	return [...lines, ...(left > 0 ? [`And ${left} more.`] : [])].join('\n');
}
