import { CHANNELS, type Channel, type MessageKind } from './kinds';
import type { PlanCarer } from './plan-facts';

/** One way to reach a family: a carer over a channel. */
export interface Route {
	readonly carerId: string;
	readonly channel: Channel;
}

/** These answer a text that just came from the telephone; said elsewhere or later they would only confuse. */
const NEVER_ELSEWHERE: readonly MessageKind[] = [
	'help-answer',
	'stop-answer',
	'start-answer',
	'which-newborn'
];

export const mayFallBack = (kind: MessageKind): boolean => !NEVER_ELSEWHERE.includes(kind);

/**
 * The next way after one that did not work: the carers in the order of calling, each by SMS and then by mail, where the
 * channel is open and not used yet for this message. Null when nothing is left and a person has to call.
 * Example: mother by SMS, mother by mail, father by SMS, father by mail, then the desk.
 */
export function nextRoute(
	carers: readonly PlanCarer[],
	failed: Route,
	used: readonly Route[]
): (Route & { readonly carer: PlanCarer }) | null {
	const order = [...carers]
		.sort((a, b) => a.callOrder - b.callOrder)
		.flatMap((carer) => CHANNELS.map((channel) => ({ carer, carerId: carer.id, channel })));
	const after = order.slice(order.findIndex((route) => isSame(route, failed)) + 1);
	const isFree = (route: Route) => !used.some((one) => isSame(one, route));
	return after.find((route) => isOpen(route.carer, route.channel) && isFree(route)) ?? null;
}

const isSame = (a: Route, b: Route): boolean => a.carerId === b.carerId && a.channel === b.channel;

const isOpen = (carer: PlanCarer, channel: Channel): boolean =>
	channel === 'sms' ? carer.canSms : carer.canMail;
