import { escape } from './html';

/** The few facts of a calendar object (RFC 5545) that a parent would see; the file itself can be opened beside them. */
export function calendarFacts(source: string): { readonly label: string; readonly value: string }[] {
	const lines = source.replace(/\r?\n[ \t]/g, '').split(/\r?\n/);
	const event = lines.slice(lines.indexOf('BEGIN:VEVENT'));
	const value = (name: string, within: readonly string[]) => {
		const line = within.find((one) => one.startsWith(`${name}:`) || one.startsWith(`${name};`));
		return line === undefined ? '' : unescaped(line.slice(line.indexOf(':') + 1));
	};
	return [
		{ label: 'What', value: value('SUMMARY', event) },
		{ label: 'Starts', value: readable(value('DTSTART', event)) },
		{ label: 'Ends', value: readable(value('DTEND', event)) },
		{ label: 'Where', value: value('LOCATION', event) },
		{ label: 'Status', value: value('STATUS', event) },
		{ label: 'Method', value: value('METHOD', lines) },
		{ label: 'Sequence', value: value('SEQUENCE', event) },
		{ label: 'UID', value: value('UID', event) }
	].filter((fact) => fact.value !== '');
}

const unescaped = (text: string): string => text.replace(/\\n/gi, '\n').replace(/\\([,;\\])/g, '$1');

/** `20260303T140000Z` becomes `2026-03-03 14:00 UTC`; a local time stays without a zone. */
function readable(stamp: string): string {
	const match = /^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)\d\d(Z?)$/.exec(stamp);
	if (match === null) return stamp;
	const [, year, month, day, hour, minute, zone] = match;
	return `${year}-${month}-${day} ${hour}:${minute}${zone === 'Z' ? ' UTC' : ''}`;
}

export function calendarCard(source: string, href: string, filename: string): string {
	const facts = calendarFacts(source)
		.map(({ label, value }) => `<dt>${label}</dt><dd dir="auto">${escape(value)}</dd>`)
		.join('');
	return `<div class="calendar"><p class="calendar-title">Calendar entry</p><dl>${facts}</dl>
<p><a href="${escape(href)}" download="${escape(filename)}">Save ${escape(filename)}</a></p></div>`;
}
