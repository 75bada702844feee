import { inArray } from 'drizzle-orm';
import { DateTime } from 'luxon';
import type { Role, StaffActor } from '../../src/lib/domain/access/roles';
import { DEFAULT_POLICY } from '../../src/lib/domain/followup/policy';
import type { Opening } from '../../src/lib/domain/followup/places';
import { hashPassword } from '../../src/lib/server/auth/password';
import type { Ctx } from '../../src/lib/server/context';
import type { Tx } from '../../src/lib/server/db/client';
import { closedDays, openings, organisations, sites } from '../../src/lib/server/db/schema/organisation';
import { staff, staffRoles } from '../../src/lib/server/db/schema/staff';
import { withTx } from '../../src/lib/server/db/tx';
import { installDefaultWording } from '../../src/lib/server/services/wording';
import type { Demo, DemoClock, DemoSite } from './context';

/** Exists only in the demo; printed by the start command. */
export const DEMO_PASSWORD = 'paper ink amber 2026';

const CITIES = [
	'Pacific/Honolulu',
	'America/Los_Angeles',
	'America/Chicago',
	'America/New_York',
	'America/Sao_Paulo',
	'Europe/Madrid',
	'Africa/Nairobi',
	'Asia/Karachi',
	'Asia/Bangkok',
	'Asia/Tokyo',
	'Australia/Brisbane',
	'Pacific/Auckland'
];

/** The invented city lies where it is late morning now, so that a clinic day is under way on every screen. */
export function demoTimeZone(now: Date): string {
	const distance = (zone: string) => {
		const local = DateTime.fromJSDate(now, { zone });
		return Math.abs(local.hour + local.minute / 60 - 11.5);
	};
	return CITIES.reduce((best, zone) => (distance(zone) < distance(best) ? zone : best));
}

const WEEKDAYS = [1, 2, 3, 4, 5];
const MAIN_CLINIC: readonly Opening[] = [
	...WEEKDAYS.flatMap((weekday): Opening[] => [
		{ weekday, from: '08:00', until: '12:00', visitKind: 'check', placeMinutes: 20, placesAtOnce: 2 },
		{ weekday, from: '13:00', until: '17:00', visitKind: 'check', placeMinutes: 20, placesAtOnce: 2 },
		{ weekday, from: '08:00', until: '10:00', visitKind: 'blood-draw', placeMinutes: 15, placesAtOnce: 1 },
		{ weekday, from: '13:00', until: '15:00', visitKind: 'feeding-help', placeMinutes: 30, placesAtOnce: 1 }
	]),
	{ weekday: 6, from: '09:00', until: '12:00', visitKind: 'check', placeMinutes: 20, placesAtOnce: 1 }
];
const SMALL_CLINIC: readonly Opening[] = [
	...WEEKDAYS.map((weekday): Opening => ({
		weekday,
		from: '09:00',
		until: '16:00',
		visitKind: 'check',
		placeMinutes: 30,
		placesAtOnce: 1
	})),
	{ weekday: 6, from: '09:00', until: '12:00', visitKind: 'check', placeMinutes: 30, placesAtOnce: 1 }
];
const EVERY_HOUR: readonly Opening[] = [1, 2, 3, 4, 5, 6, 7].map((weekday) => ({
	weekday,
	from: '00:00',
	until: '23:59',
	visitKind: 'check',
	placeMinutes: 30,
	placesAtOnce: 2
}));

interface Member {
	readonly key: string;
	readonly name: string;
	readonly email: string;
	readonly roles: readonly { role: Role; siteId: string | null }[];
}

async function insertSite(
	tx: Tx,
	ctx: Ctx,
	site: {
		organisationId: string;
		kind: 'birth-unit' | 'clinic';
		name: string;
		address: string;
		phone: string;
		timeZone: string;
		dutyStaffIds?: string[];
	}
): Promise<DemoSite> {
	const id = ctx.random.id();
	const { dutyStaffIds = [], ...columns } = site;
	await tx.insert(sites).values({
		...columns,
		id,
		afterHoursPhone: '+12025550199',
		dutyEmail: `duty.${site.kind}@example.org`,
		policy: { ...DEFAULT_POLICY, dutyStaffIds },
		createdAt: ctx.clock.now()
	});
	return { id, name: site.name };
}

async function insertOpenings(tx: Tx, ctx: Ctx, siteId: string, weekly: readonly Opening[]): Promise<void> {
	await tx.insert(openings).values(weekly.map((opening) => ({ ...opening, id: ctx.random.id(), siteId })));
}

async function insertMember(
	tx: Tx,
	ctx: Ctx,
	organisationId: string,
	asked: { member: Member; passwordHash: string }
): Promise<StaffActor> {
	const { member, passwordHash } = asked;
	const staffId = ctx.random.id();
	const { name, email, roles } = member;
	await tx
		.insert(staff)
		.values({ id: staffId, organisationId, email, name, passwordHash, createdAt: ctx.clock.now() });
	await tx.insert(staffRoles).values(roles.map((role) => ({ ...role, id: ctx.random.id(), staffId })));
	return { kind: 'staff', staffId, organisationId, name, roles };
}

/** A weekday a few days ahead on which both clinics are closed. */
function holiday(now: Date, timeZone: string): string {
	let day = DateTime.fromJSDate(now, { zone: timeZone }).plus({ days: 6 });
	while (day.weekday > 5) day = day.plus({ days: 1 });
	return day.toISODate() ?? '';
}

export interface DemoOptions {
	/** Clinics open day and night: for tests, which must find a place at any hour of the week. */
	readonly isAlwaysOpen: boolean;
}

interface Sites {
	readonly organisationId: string;
	readonly unit: DemoSite;
	readonly main: DemoSite;
	readonly small: DemoSite;
}

async function insertSites(
	tx: Tx,
	ctx: Ctx,
	asked: DemoOptions & { now: Date; timeZone: string }
): Promise<Sites> {
	const organisationId = ctx.random.id();
	const { timeZone, now, isAlwaysOpen } = asked;
	await tx.insert(organisations).values({
		id: organisationId,
		name: 'Quillhaven Mother and Newborn Care',
		standard: 'aap-2022',
		emergencyNumber: '911',
		createdAt: ctx.clock.now()
	});
	const common = { organisationId, timeZone };
	const unit = await insertSite(tx, ctx, {
		...common,
		kind: 'birth-unit',
		name: 'Quillhaven Birth Unit',
		address: '1 Lantern Hill',
		phone: '+12025550100'
	});
	const main = await insertSite(tx, ctx, {
		...common,
		kind: 'clinic',
		name: 'Harbor Lane Newborn Clinic',
		address: '14 Harbor Lane',
		phone: '+12025550101'
	});
	const small = await insertSite(tx, ctx, {
		...common,
		kind: 'clinic',
		name: 'Mill Street Newborn Clinic',
		address: '230 Mill Street',
		phone: '+12025550102'
	});
	await insertOpenings(tx, ctx, main.id, isAlwaysOpen ? EVERY_HOUR : MAIN_CLINIC);
	await insertOpenings(tx, ctx, small.id, isAlwaysOpen ? EVERY_HOUR : SMALL_CLINIC);
	const closedOn = holiday(now, timeZone);
	if (!isAlwaysOpen) {
		await tx
			.insert(closedDays)
			.values(
				[main, small].map(({ id }) => ({ id: ctx.random.id(), siteId: id, closedOn, reason: 'Harbor Day' }))
			);
	}
	return { organisationId, unit, main, small };
}

const members = ({ unit, main, small }: Sites): Member[] => [
	{
		key: 'nurse',
		name: 'Nora Adeyinka',
		email: 'nurse@example.org',
		roles: [{ role: 'nurse', siteId: unit.id }]
	},
	{
		key: 'desk',
		name: 'Dario Fenwick',
		email: 'desk@example.org',
		roles: [{ role: 'desk', siteId: main.id }]
	},
	{
		key: 'pediatrician',
		name: 'Dr. Ilse Varga-Okoro',
		email: 'pediatrician@example.org',
		roles: [{ role: 'pediatrician', siteId: main.id }]
	},
	{
		key: 'duty',
		name: 'Dr. Tomasz Lindqvist',
		email: 'duty@example.org',
		roles: [
			{ role: 'pediatrician', siteId: main.id },
			{ role: 'pediatrician', siteId: small.id }
		]
	},
	{
		key: 'desk-small',
		name: 'Mei Castellanos',
		email: 'desk.mill@example.org',
		roles: [{ role: 'desk', siteId: small.id }]
	},
	{
		key: 'pediatrician-small',
		name: 'Dr. Hamid Brandvold',
		email: 'pediatrician.mill@example.org',
		roles: [{ role: 'pediatrician', siteId: small.id }]
	},
	{
		key: 'admin',
		name: 'Agnes Thackeray-Diallo',
		email: 'admin@example.org',
		roles: [{ role: 'admin', siteId: null }]
	}
];

async function nameDutyPersons(tx: Tx, clinics: readonly DemoSite[], dutyStaffIds: string[]): Promise<void> {
	await tx
		.update(sites)
		.set({ policy: { ...DEFAULT_POLICY, dutyStaffIds } })
		.where(
			inArray(
				sites.id,
				clinics.map(({ id }) => id)
			)
		);
}

/** The invented organisation: one birth unit, two clinics, their people, hours and wording. */
export async function buildOrganisation(ctx: Ctx, clock: DemoClock, options: DemoOptions): Promise<Demo> {
	const now = clock.now();
	const timeZone = demoTimeZone(now);
	const passwordHash = await hashPassword(DEMO_PASSWORD);
	return withTx(ctx.db, async (tx) => {
		const at = await insertSites(tx, ctx, { ...options, now, timeZone });
		const people = new Map<string, StaffActor>();
		for (const member of members(at))
			people.set(member.key, await insertMember(tx, ctx, at.organisationId, { member, passwordHash }));
		const person = (key: string): StaffActor => {
			const found = people.get(key);
			if (!found) throw new Error(`No demo person ${key}.`);
			return found;
		};
		await nameDutyPersons(tx, [at.main, at.small], [person('duty').staffId, person('pediatrician').staffId]);
		await installDefaultWording(tx, ctx, at.organisationId);
		return {
			ctx,
			clock,
			now,
			timeZone,
			unit: at.unit,
			clinics: [at.main, at.small],
			nurse: person('nurse'),
			desk: new Map([
				[at.main.id, person('desk')],
				[at.small.id, person('desk-small')]
			]),
			pediatrician: new Map([
				[at.main.id, person('pediatrician')],
				[at.small.id, person('pediatrician-small')]
			])
		};
	});
}

/** The demo's sign-ins as plain text, for the start command to print. */
export function signIns(): string {
	const rows = [
		['nurse', 'nurse@example.org'],
		['front desk', 'desk@example.org, desk.mill@example.org'],
		['pediatrician', 'pediatrician@example.org, pediatrician.mill@example.org'],
		['administrator', 'admin@example.org']
	] as const;
	return (
		[
			`Demo sign-ins (password for all: ${DEMO_PASSWORD})`,
			...rows.map(([who, email]) => `  ${who.padEnd(14)} ${email}`)
		].join('\n') + '\n'
	);
}
