import { and, asc, eq, gt, lt, sql } from 'drizzle-orm';
import type { Adapter, DatabaseSession, DatabaseUser } from 'lucia';
import { createHash } from 'node:crypto';
import type { Ctx } from '../context';
import { sessions, staff, staffRoles } from '../db/schema/staff';

/** A session ends when unused for this long; common practice, no source. */
export const SESSION_IDLE_MINUTES = 120;
/** And in any case this long after signing in: one long shift. */
export const SESSION_ABSOLUTE_HOURS = 12;
/** Time to enter the second factor after the password. */
const HALF_SESSION_MINUTES = 10;

/** What the database holds of a session id; who reads the table cannot take over a session. */
export const hashToken = (token: string): string => createHash('sha256').update(token).digest('hex');

/** Lucia's storage over our tables. An account that is disabled has no user here, so that its sessions end. */
export function sessionStore({ db, clock }: Pick<Ctx, 'db' | 'clock'>): Adapter {
	return {
		async getSessionAndUser(sessionId) {
			const rows = await db
				.select({ session: sessions, person: staff, role: staffRoles.role, siteId: staffRoles.siteId })
				.from(sessions)
				.leftJoin(staff, and(eq(staff.id, sessions.userId), eq(staff.isDisabled, false)))
				.leftJoin(staffRoles, eq(staffRoles.staffId, staff.id))
				.where(eq(sessions.id, hashToken(sessionId)));
			const [first] = rows;
			if (first === undefined) return [null, null];
			const { organisationId, name } = first.person ?? {};
			const roles = rows.flatMap(({ role, siteId }) => (role === null ? [] : [{ role, siteId }]));
			const user: DatabaseUser | null =
				organisationId === undefined || name === undefined
					? null
					: { id: first.session.userId, attributes: { organisationId, name, roles } };
			return [asSession(first.session, sessionId), user];
		},
		async getUserSessions(staffId) {
			const rows = await db.select().from(sessions).where(eq(sessions.userId, staffId));
			return rows.map((row) => asSession(row, row.id));
		},
		async setSession({ id, userId, expiresAt, attributes }) {
			const { startedAt, isComplete } = attributes;
			const half = new Date(startedAt.getTime() + HALF_SESSION_MINUTES * 60_000);
			await db.insert(sessions).values({
				id: hashToken(id),
				userId,
				expiresAt: isComplete ? expiresAt : half,
				startedAt,
				isComplete
			});
		},
		async updateSessionExpiration(sessionId, expiresAt) {
			// The idle limit never moves past the absolute one, and half a session never lasts longer.
			await db
				.update(sessions)
				.set({
					expiresAt: sql`least(${sql.param(expiresAt, sessions.expiresAt)}, date_add(${sessions.startedAt}, interval ${SESSION_ABSOLUTE_HOURS} hour))`
				})
				.where(and(eq(sessions.id, hashToken(sessionId)), eq(sessions.isComplete, true)));
		},
		async deleteSession(sessionId) {
			await db.delete(sessions).where(eq(sessions.id, hashToken(sessionId)));
		},
		async deleteUserSessions(staffId) {
			await db.delete(sessions).where(eq(sessions.userId, staffId));
		},
		async deleteExpiredSessions() {
			await db.delete(sessions).where(lt(sessions.expiresAt, clock.now()));
		}
	};
}

function asSession(row: typeof sessions.$inferSelect, id: string): DatabaseSession {
	const { userId, expiresAt, startedAt, isComplete } = row;
	return { id, userId, expiresAt, attributes: { startedAt, isComplete } };
}

export interface OpenSession {
	/** The stored hash, which names the session without opening it. */
	readonly id: string;
	readonly startedAt: Date;
	readonly expiresAt: Date;
}

/** The person's sessions that are still good, oldest first. */
export async function listOpenSessions({ db, clock }: Ctx, staffId: string): Promise<OpenSession[]> {
	return db
		.select({ id: sessions.id, startedAt: sessions.startedAt, expiresAt: sessions.expiresAt })
		.from(sessions)
		.where(
			and(eq(sessions.userId, staffId), eq(sessions.isComplete, true), gt(sessions.expiresAt, clock.now()))
		)
		.orderBy(asc(sessions.startedAt));
}

/** Ends one of the person's own sessions by its stored hash; false where it is not theirs or already gone. */
export async function deleteSessionByHash({ db }: Ctx, staffId: string, hash: string): Promise<boolean> {
	const [result] = await db.delete(sessions).where(and(eq(sessions.id, hash), eq(sessions.userId, staffId)));
	return result.affectedRows > 0;
}
