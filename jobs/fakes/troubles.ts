import { z } from 'zod';

/** Failures on demand. What each does stands beside it. */
export const SMS_TROUBLES = [
	'too-many', // 429 with Retry-After; not taken
	'server-error', // 500; not taken
	'server-error-taken', // 500 although taken
	'cut', // taken, then the connection breaks
	'silent', // taken, and no answer for `seconds`
	'slow', // taken and answered after `seconds`
	'late-taken', // answers nothing, and takes the message only after `seconds`
	'hidden', // taken and answered, shown in the list only after `seconds`
	'hidden-cut', // taken, the connection breaks, shown in the list only after `seconds`
	'invalid', // 400, 21211: not a telephone number
	'stopped', // 400, 21610: the telephone said STOP
	'not-mobile', // 400, 21614
	'carrier-reject', // taken, later reported undelivered (30007)
	'unreachable', // taken, later reported undelivered (30003)
	'no-report' // taken, and nothing is heard of it again
] as const;
export const MAIL_TROUBLES = [
	'greylist', // 451: come back later
	'mailbox-full', // 452 4.2.2
	'no-such-mailbox', // 550 5.1.1
	'too-many', // 421
	'cut', // taken, then the connection breaks before the 250
	'silent', // taken, and no answer for `seconds`
	'slow' // taken and answered after `seconds`
] as const;
export type SmsTrouble = (typeof SMS_TROUBLES)[number];
export type MailTrouble = (typeof MAIL_TROUBLES)[number];

const shared = {
	/** How many messages meet it. */
	times: z.number().int().min(1).default(1),
	seconds: z.number().min(0).default(1),
	/** Only messages to this number or address. */
	to: z.string().optional()
};
export const troubleOrder = z.discriminatedUnion('channel', [
	z.object({ channel: z.literal('sms'), kind: z.enum(SMS_TROUBLES), ...shared }),
	z.object({ channel: z.literal('mail'), kind: z.enum(MAIL_TROUBLES), ...shared })
]);
export type TroubleOrder = z.output<typeof troubleOrder>;

/** Telephones that always meet the same trouble: the hosted service's own test numbers, and ours of the range for fiction. */
const SMS_MAGIC: readonly { readonly ends: string; readonly kind: SmsTrouble; readonly seconds: number }[] = [
	{ ends: '5005550001', kind: 'invalid', seconds: 0 },
	{ ends: '5005550004', kind: 'stopped', seconds: 0 },
	{ ends: '5005550009', kind: 'not-mobile', seconds: 0 },
	{ ends: '5550190', kind: 'unreachable', seconds: 0 },
	{ ends: '5550191', kind: 'carrier-reject', seconds: 0 },
	{ ends: '5550192', kind: 'no-report', seconds: 0 },
	{ ends: '5550193', kind: 'invalid', seconds: 0 },
	{ ends: '5550194', kind: 'slow', seconds: 3 }
];
/** Mailboxes that always meet the same trouble, by the part before the @. */
const MAIL_MAGIC: Readonly<Record<string, MailTrouble>> = {
	'mailbox-full': 'mailbox-full',
	'no-such-mailbox': 'no-such-mailbox'
};

export interface Met<Kind> {
	readonly kind: Kind;
	readonly seconds: number;
}

/** The troubles that were ordered and are not used up, the oldest first. */
export class Troubles {
	#orders: TroubleOrder[] = [];
	readonly #greylisted = new Set<string>();

	order(order: TroubleOrder): void {
		this.#orders.push({ ...order });
	}

	get open(): readonly TroubleOrder[] {
		return this.#orders;
	}

	clear(): void {
		this.#orders = [];
		this.#greylisted.clear();
	}

	forSms(to: string): Met<SmsTrouble> | null {
		const order = this.#use('sms', to);
		if (order?.channel === 'sms') return order;
		return SMS_MAGIC.find(({ ends }) => to.endsWith(ends)) ?? null;
	}

	forMail(to: string): Met<MailTrouble> | null {
		const order = this.#use('mail', to);
		if (order?.channel === 'mail') return order;
		const [mailbox = ''] = to.split('@');
		// The first try of each greylisted mailbox is put off, the next is taken.
		if (mailbox === 'greylist' && !this.#greylisted.has(to)) {
			this.#greylisted.add(to);
			return { kind: 'greylist', seconds: 0 };
		}
		const kind = MAIL_MAGIC[mailbox];
		return kind === undefined ? null : { kind, seconds: 0 };
	}

	#use(channel: TroubleOrder['channel'], to: string): TroubleOrder | null {
		const order = this.#orders.find(
			(one) => one.channel === channel && (one.to === undefined || one.to === to)
		);
		if (order === undefined) return null;
		order.times--;
		if (order.times === 0) this.#orders = this.#orders.filter((one) => one !== order);
		return order;
	}
}
