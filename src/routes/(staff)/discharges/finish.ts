import { LANGUAGE_NAMES } from '$lib/domain/messaging/language';
import { isInsideWindow } from '$lib/domain/followup/places';
import { allowsDischarge } from '$lib/domain/followup/transition';
import { formatDayTime } from '$lib/format/time';
import { VISIT_KIND_WORDS } from '$lib/format/words';
import type { DischargeForm } from '$lib/schemas/discharge';
import { readCarers } from '$lib/schemas/discharge-carers';
import type { LiveResult } from '$lib/schemas/discharge-live';
import { IssueList, type FormIssue } from '$lib/schemas/discharge-values';
import { LEFT_TO_DESK, readPlace } from './place';

export interface FinishSetting {
	readonly live: LiveResult;
	readonly clinic: { readonly name: string; readonly timeZone: string } | undefined;
	/** A visit that stands already, booked by the desk in the meantime. */
	readonly hasVisit: boolean;
}

/** True where the standard, on what was typed, lets the newborn go home with a follow-up. */
export const mayGoHome = (live: LiveResult): boolean =>
	live.state === 'assessed' && allowsDischarge(live.assessment.disposition);

function placeIssue(form: DischargeForm, { live, hasVisit }: FinishSetting): string | null {
	if (hasVisit || !mayGoHome(live)) return null;
	if (form.place === '') return 'Choose a place for the visit, or leave it to the clinic’s desk.';
	const place = readPlace(form.place);
	if (!place) return form.place === LEFT_TO_DESK ? null : 'Choose one of the places shown.';
	const window = live.state === 'assessed' ? live.assessment.window : null;
	return isInsideWindow(place.startsAt, window)
		? null
		: 'This place is no longer inside the window. Choose another one.';
}

/** What keeps a readable discharge from being finished, beside the field where it is settled. */
export function finishIssues(form: DischargeForm, setting: FinishSetting): FormIssue[] {
	const list = new IssueList();
	const carers = readCarers(form, new IssueList());
	if (!carers.some(({ phone, email }) => phone !== null || email !== null)) {
		list.add(
			'carer1Phone',
			'Give a telephone number or an e-mail address: the clinic must be able to reach the family.'
		);
	}
	const place = placeIssue(form, setting);
	if (place) list.add('place', place);
	if (setting.live.state === 'assessed' && !mayGoHome(setting.live) && form.againstAdviceWhy.trim() === '') {
		list.add(
			'againstAdviceWhy',
			'The standard asks for something before discharge. Settle it, or say why the newborn leaves all the same.'
		);
	}
	return list.issues;
}

/** What the button will do, one sentence a step; empty while nothing can be finished. */
export function finishSteps(form: DischargeForm, setting: FinishSetting): string[] {
	const { clinic, live, hasVisit } = setting;
	if (!clinic || live.state !== 'assessed') return [];
	const place = mayGoHome(live) ? readPlace(form.place) : null;
	const isOpen = mayGoHome(live) && !hasVisit && form.place === '';
	const visit = hasVisit
		? 'The visit that was made stays as it is.'
		: isOpen
			? 'The visit: choose a place above, or leave it to the clinic’s desk.'
			: place
				? `Books ${formatDayTime(place.startsAt, clinic)} at ${clinic.name}: ${VISIT_KIND_WORDS[place.kind].toLowerCase()}.`
				: `Asks the desk of ${clinic.name} to make the visit with the family.`;
	return [
		visit,
		...messageSteps(form),
		`Hands the newborn over to ${clinic.name}, with values, risks and your name.`
	];
}

/** Keeps a name in another script from turning the sentence around it. */
const isolated = (text: string): string => `\u2068${text}\u2069`;

function messageSteps(form: DischargeForm): string[] {
	const carers = readCarers(form, new IssueList());
	const told = carers.flatMap((carer) => {
		const ways = [
			carer.consentsToSms && carer.phone ? 'SMS' : '',
			carer.consentsToMail && carer.email ? 'e-mail' : ''
		];
		const by = ways.filter(Boolean).join(' and ');
		return by
			? [`Messages ${isolated(carer.name)} by ${by} in ${isolated(LANGUAGE_NAMES[carer.language])}.`]
			: [];
	});
	return told.length > 0 ? told : ['Messages nobody: nobody agreed to messages, so the paper sheet must do.'];
}

/** The button's words: what it does, in the order it does it. */
export function finishLabel(form: DischargeForm, setting: FinishSetting): string {
	if (setting.live.state !== 'assessed') return 'Finish the discharge';
	if (!mayGoHome(setting.live)) return 'Hand over against the standard';
	if (setting.hasVisit) return 'Message the family and hand over';
	if (form.place === '') return 'Finish the discharge';
	return readPlace(form.place)
		? 'Book, message the family and hand over'
		: 'Hand over, the desk makes the visit';
}
