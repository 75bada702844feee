import { ageHoursAt } from '../../format/duration';
import { formatDayTime, formatSpan } from '../../format/time';
import { windowTestLabel } from '../../format/values';
import { measurementSentence } from './sentence';
import type { HourLineMessage, HourLineModel } from './model';
import type { HourLineWords } from './words';

export interface HourLineTableRow {
	readonly at: Date;
	readonly hour: number;
	readonly when: string;
	readonly what: string;
}

const CHANNELS: Record<HourLineMessage['channel'], string> = { sms: 'SMS', mail: 'Mail', call: 'Call' };

/** Everything on the picture as rows, sorted by time; `plain` keeps to what a family may see. */
export function hourLineTableRows(
	model: HourLineModel,
	words: HourLineWords,
	plain: boolean
): HourLineTableRow[] {
	const style = plain
		? ({ timeZone: model.timeZone, locale: words.locale, audience: 'family' } as const)
		: { timeZone: model.timeZone };
	const row = (at: Date, what: string, when = formatDayTime(at, style)): HourLineTableRow => ({
		at,
		hour: Math.floor(ageHoursAt(model.bornAt, at)),
		when,
		what
	});
	const shared = [
		row(model.bornAt, words.born),
		...(model.visits ?? []).map((visit) =>
			row(visit.at, `${words.visit}, ${words.visitKinds[visit.kind]}: ${words.visitStates[visit.state]}`)
		),
		...(model.checkIns ?? []).map((checkIn) =>
			row(checkIn.at, `${words.checkIn}: ${words.checkInResults[checkIn.result]}`)
		)
	];
	const clinical = plain ? [] : clinicalRows(model, row);
	return [...shared, ...clinical].sort((a, b) => a.at.getTime() - b.at.getTime());
}

function clinicalRows(
	model: HourLineModel,
	row: (at: Date, what: string, when?: string) => HourLineTableRow
): HourLineTableRow[] {
	const { window, timeZone } = model;
	return [
		...(model.measurements ?? []).map((m) => row(m.at, measurementSentence(model, m))),
		...(window
			? [
					row(
						window.from,
						`Window${window.test ? `: ${windowTestLabel(window.test)}` : ''}${window.met ? ', met' : ''}`,
						formatSpan(window.from, window.until, { timeZone })
					)
				]
			: []),
		...(model.phototherapy ?? []).map((course) =>
			row(
				course.from,
				`Phototherapy (${course.setting.replace('-', ' ')})${course.to ? '' : ', running'}`,
				course.to ? formatSpan(course.from, course.to, { timeZone }) : undefined
			)
		),
		...(model.messages ?? []).map((m) =>
			row(
				m.at,
				`${CHANNELS[m.channel]} ${m.direction === 'to-family' ? 'to' : 'from'} the family${m.failed ? ', failed' : ''}`
			)
		)
	];
}
