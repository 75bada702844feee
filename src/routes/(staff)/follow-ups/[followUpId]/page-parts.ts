import type { HourLineMessage, HourLineModel } from '$lib/ui/hour-line/model';
import { hourLineOf } from '$lib/ui/staff/clinician/model';
import { hasFailed } from '$lib/ui/staff/clinician/message-words';
import type { PageData } from './$types';

type View = PageData['view'];

/** Messages that left or were tried, words written, and calls: the ticks on the hour line. */
function ticks({ messages, words, attempts }: View): HourLineMessage[] {
	const sent = messages.flatMap((one): HourLineMessage[] =>
		one.sentAt
			? [
					{
						at: one.sentAt,
						direction: 'to-family',
						channel: one.channel,
						failed: hasFailed(one.state, one.delivery)
					}
				]
			: []
	);
	const said = words.map((one): HourLineMessage => ({
		at: one.at,
		direction: one.direction === 'in' ? 'from-family' : 'to-family',
		channel: 'sms'
	}));
	const calls = attempts
		.filter((one) => one.channel === 'call')
		.map((one): HourLineMessage => ({
			at: one.at,
			direction: 'to-family',
			channel: 'call',
			failed: one.outcome !== 'reached'
		}));
	return [...sent, ...said, ...calls].sort((a, b) => a.at.getTime() - b.at.getTime());
}

/** The page's hour line; null for those who may see the latest value only. */
export function hourLineOfView(view: View): HourLineModel | null {
	if (!view.values) return null;
	const { page } = view;
	return hourLineOf({
		input: view.values.input,
		assessment: view.values.assessment,
		timeZone: page.clinic.timeZone,
		now: view.now,
		round: page.round,
		window: page.window,
		visits: view.visits,
		checkIns: view.checkIns.map(({ answeredAt, result }) => ({ at: answeredAt, result })),
		messages: ticks(view),
		phototherapy: view.phototherapy,
		siteName: page.clinic.name
	});
}

const DONE: Readonly<Record<string, string>> = {
	value: 'The value is saved. Now the decision about it is owed.',
	strike: 'The value is struck; it stays on record. What it led to is decided anew.',
	decided: 'The decision is saved. The next step stands below.',
	'treatment-ended': 'The end of phototherapy is saved. The window for the repeat value is set.',
	closed: 'The follow-up is closed.',
	reopened: 'The follow-up is open again: a decision is owed.',
	merged: 'The follow-up is merged into the other one.',
	settled: 'The alert is settled.'
};

/** What was just done, in a sentence; null for anything else in the address. */
export const doneWords = (done: string | null): string | null =>
	done !== null && Object.hasOwn(DONE, done) ? (DONE[done] ?? null) : null;

export interface PageLink {
	readonly id: string;
	readonly label: string;
	readonly key?: string;
}

/** The parts of the page that this person sees, each with the key that leads to it. */
export function pageLinks({ may, page, alerts, values }: View): PageLink[] {
	const isHome = page.stage !== 'closed' && page.stage !== 'before-discharge';
	return [
		...(alerts.length > 0 ? [{ id: 'alerts', label: 'Alerts', key: 'a' }] : []),
		{ id: 'hour-line', label: values ? 'Hour line' : 'Latest value', key: 'h' },
		...(values ? [{ id: 'result', label: 'Result', key: 'r' }] : []),
		...(may.decide && page.stage === 'in-treatment'
			? [{ id: 'end', label: 'End of phototherapy', key: 'e' }]
			: []),
		...(may.decide && isHome && values ? [{ id: 'decide', label: 'Decide', key: 'd' }] : []),
		...(may.recordValues && isHome && values ? [{ id: 'new-value', label: 'New value', key: 'n' }] : []),
		...(values ? [{ id: 'values', label: 'Values', key: 'v' }] : []),
		{ id: 'visits', label: 'Visits' },
		{ id: 'check-ins', label: 'Check-ins', key: 'c' },
		...(may.seeThread ? [{ id: 'family', label: 'Family and messages', key: 'm' }] : []),
		{ id: 'course', label: 'Course' },
		...(may.decide
			? [{ id: 'ending', label: page.stage === 'closed' ? 'Open again' : 'Close or merge' }]
			: [])
	];
}

/** Moves to a part of the page and to the first thing in it that can be used. */
function goTo(id: string): void {
	const part = document.getElementById(id);
	part?.scrollIntoView({ block: 'start' });
	part
		?.querySelector<HTMLElement>(
			'input:not([type="hidden"]), textarea, select, [tabindex="0"], summary, button, a'
		)
		?.focus({ preventScroll: true });
}

/** A key for each part that has one. */
export function pageKeys(links: readonly PageLink[]): Record<string, () => void> {
	return Object.fromEntries(links.flatMap(({ id, key }) => (key ? [[key, () => goTo(id)]] : [])));
}
