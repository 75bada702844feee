import type { Channel } from '../../src/lib/domain/messaging/kinds';
import { DEFAULT_POLICY } from '../../src/lib/domain/followup/policy';
import type { Db } from '../../src/lib/server/db/client';
import { messages } from '../../src/lib/server/db/schema/messaging';
import { organisations, sites } from '../../src/lib/server/db/schema/organisation';
import type { RenderedMessage, Renderer } from '../../src/lib/server/outbox/port';
import { systemRandom } from '../../src/lib/server/random';

/** Messages without families, for measuring and breaking the outbox alone. Where one goes to stands in its facts. */

const AT_ONCE = 1000;
const HOUR = 3_600_000;

export const PLAIN_DOMAIN = 'example.org';

/** An organisation with so many clinics; returns their ids. */
export async function insertPlainSites(db: Db, count: number): Promise<string[]> {
	const createdAt = new Date();
	const organisationId = systemRandom.id();
	await db
		.insert(organisations)
		.values({ id: organisationId, name: 'Plain', standard: 'aap-2022', emergencyNumber: '911', createdAt });
	const ids = Array.from({ length: count }, () => systemRandom.id());
	await db.insert(sites).values(
		ids.map((id, index) => ({
			id,
			organisationId,
			kind: 'clinic' as const,
			name: `Clinic ${index + 1}`,
			address: '1 Plain Street',
			phone: '+12025550101',
			afterHoursPhone: '+12025550102',
			dutyEmail: `duty-${index + 1}@${PLAIN_DOMAIN}`,
			timeZone: 'America/New_York',
			policy: DEFAULT_POLICY,
			createdAt
		}))
	);
	return ids;
}

export interface PlainOrder {
	readonly count: number;
	readonly siteIds: readonly string[];
	readonly channel: Channel;
	readonly priority?: number;
	readonly runAt?: Date;
	readonly expiresAt?: Date;
	/** Where number `index` goes; by default a telephone or mailbox of its own. */
	readonly to?: (index: number) => string;
}

/** Plans messages that are due; returns their ids in order. */
export async function insertPlainMessages(db: Db, order: PlainOrder): Promise<string[]> {
	const now = new Date();
	const to = order.to ?? addressOf(order.channel);
	const ids = Array.from({ length: order.count }, () => systemRandom.id());
	const rows = ids.map((id, index) => ({
		id,
		siteId: order.siteIds[index % order.siteIds.length] ?? '',
		kind: 'visit-booked' as const,
		occasion: id,
		channel: order.channel,
		language: 'en' as const,
		dedupeKey: `plain:${id}`,
		facts: { to: to(index) },
		state: 'planned' as const,
		priority: order.priority ?? 5,
		runAt: order.runAt ?? new Date(now.getTime() - HOUR),
		expiresAt: order.expiresAt ?? new Date(now.getTime() + 24 * HOUR),
		createdAt: now,
		updatedAt: now
	}));
	for (let start = 0; start < rows.length; start += AT_ONCE) {
		await db.insert(messages).values(rows.slice(start, start + AT_ONCE));
	}
	return ids;
}

const addressOf = (channel: Channel) => (index: number) =>
	channel === 'sms' ? `+1202${String(2_000_000 + index)}` : `family-${index}@${PLAIN_DOMAIN}`;

export const plainText = (id: string): string => `Your visit is on Tuesday at 10. (${id.slice(0, 6)})`;

/** Renders what `insertPlainMessages` planned. */
export const renderPlain: Renderer = async (_db, _ctx, rows) =>
	new Map(
		rows.map((row): [string, RenderedMessage] => [
			row.id,
			{
				kind: 'send',
				to: row.facts.to ?? '',
				templateId: null,
				subject: 'Your visit',
				text: plainText(row.id),
				reference: row.channel === 'sms' ? row.id.slice(0, 6) : `<${row.id}@${PLAIN_DOMAIN}>`
			}
		])
	);
