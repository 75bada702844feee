import type { Channel } from './kinds';
import { dedupeKeyOf, type PlanCarer, type PlannedMessage } from './plan-facts';

/** `both`: every open channel. `preferred`: SMS where it is open, else mail. */
export type Reach = 'both' | 'preferred' | Channel;

const inOrder = (carers: readonly PlanCarer[]): PlanCarer[] =>
	[...carers].sort((a, b) => a.callOrder - b.callOrder);

const isReachable = (carer: PlanCarer): boolean => carer.canSms || carer.canMail;

/** The first carer in the order of calling with a channel open to us. */
export const firstReachable = (carers: readonly PlanCarer[]): PlanCarer | undefined =>
	inOrder(carers).find(isReachable);

/** The next carer after the first reachable one, for the ladder. */
export const secondReachable = (carers: readonly PlanCarer[]): PlanCarer | undefined =>
	inOrder(carers).filter(isReachable)[1];

/** Channels of a carer for the reach asked. */
export function channelsOf(carer: PlanCarer, reach: Reach): Channel[] {
	const open: Channel[] = [];
	if (carer.canSms) open.push('sms');
	if (carer.canMail) open.push('mail');
	if (reach === 'both') return open;
	if (reach === 'preferred') return open.slice(0, 1);
	return open.filter((channel) => channel === reach);
}

type Unaddressed = Omit<PlannedMessage, 'carerId' | 'channel' | 'language' | 'dedupeKey'>;

/** The same message to one carer, once for each channel of the reach. */
export function addressed(
	followUpId: string,
	carer: PlanCarer,
	reach: Reach,
	message: Unaddressed
): PlannedMessage[] {
	return channelsOf(carer, reach).map((channel) => {
		const whole = { ...message, carerId: carer.id, channel, language: carer.language };
		return { ...whole, dedupeKey: dedupeKeyOf(followUpId, whole) };
	});
}
