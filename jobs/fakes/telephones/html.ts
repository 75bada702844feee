const ENTITIES: Readonly<Record<string, string>> = {
	'&': '&amp;',
	'<': '&lt;',
	'>': '&gt;',
	'"': '&quot;',
	"'": '&#39;'
};

export const escape = (text: string): string => text.replace(/[&<>"']/g, (sign) => ENTITIES[sign] ?? sign);

/** Text with its addresses made clickable and its line breaks kept. */
export function linked(text: string): string {
	return text
		.split(/(https?:\/\/[^\s<>"']*[^\s<>"'.,;:!?)\]])/)
		.map((part, index) => (index % 2 === 0 ? escape(part) : link(part)))
		.join('')
		.replaceAll('\n', '<br>');
}

const link = (address: string): string =>
	`<a href="${escape(address)}" target="_blank" rel="noopener noreferrer" dir="ltr">${escape(address)}</a>`;

/** An instant that the page's script rewrites in the reader's own zone. */
export const instant = (at: number): string => {
	const iso = new Date(at).toISOString();
	return `<time datetime="${iso}">${iso.slice(0, 16).replace('T', ' ')} UTC</time>`;
};
