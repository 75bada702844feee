import { textDirection, type Language } from '../../domain/messaging/language';

const ESCAPES: Readonly<Record<string, string>> = {
	'&': '&amp;',
	'<': '&lt;',
	'>': '&gt;',
	'"': '&quot;',
	"'": '&#39;'
};

const escape = (text: string): string =>
	text.replace(/[&<>"']/g, (character) => ESCAPES[character] ?? character);

const URL_IN_TEXT = /https?:\/\/[^\s<]+/g;

const linked = (escaped: string): string =>
	escaped.replace(URL_IN_TEXT, (url) => `<a href="${url}" style="color:#7a4a00">${url}</a>`);

/** A mail's text as plain paragraphs: language and direction said, links to press, no pictures, nothing fetched. */
export function mailHtml(text: string, language: Language): string {
	const paragraphs = text
		.split(/\n{2,}/)
		.map((paragraph) => `<p style="margin:0 0 1em">${linked(escape(paragraph)).replace(/\n/g, '<br>')}</p>`)
		.join('\n');
	const direction = textDirection(language);
	const body =
		'margin:0;padding:24px;background:#fbf7ef;color:#1d2433;font:17px/1.5 sans-serif;max-width:34em';
	return `<!doctype html>
<html lang="${language === 'zh' ? 'zh-Hans' : language}" dir="${direction}">
<head><meta charset="utf-8"></head>
<body style="${body}">
${paragraphs}
</body>
</html>
`;
}
