// @ts-check
// Brings news without losing what is being typed. Everything works without it, too.

const EVERY_MILLISECONDS = 1500;
const wall = document.getElementById('wall');

/** @param {ParentNode} root */
function localTimes(root) {
	const format = new Intl.DateTimeFormat(undefined, {
		weekday: 'short',
		day: 'numeric',
		month: 'short',
		hour: 'numeric',
		minute: '2-digit'
	});
	for (const time of root.querySelectorAll('time')) time.textContent = format.format(new Date(time.dateTime));
}

/** @param {ParentNode} root */
function toNewest(root) {
	for (const thread of root.querySelectorAll('.thread')) thread.scrollTop = thread.scrollHeight;
}

/** @param {string} html */
function replaceWall(html) {
	if (!wall) return;
	const active = document.activeElement;
	const focused = active instanceof HTMLElement ? active.dataset.key : undefined;
	const typed = new Map();
	for (const field of wall.querySelectorAll('input[data-key]')) {
		if (field instanceof HTMLInputElement) typed.set(field.dataset.key, field.value);
	}
	const folded = new Map();
	for (const part of wall.querySelectorAll('details[data-key]')) {
		if (part instanceof HTMLDetailsElement) folded.set(part.dataset.key, part.open);
	}
	wall.innerHTML = html;
	for (const field of wall.querySelectorAll('input[data-key]')) {
		if (field instanceof HTMLInputElement) field.value = typed.get(field.dataset.key) ?? field.value;
	}
	for (const part of wall.querySelectorAll('details[data-key]')) {
		if (part instanceof HTMLDetailsElement) part.open = folded.get(part.dataset.key) ?? part.open;
	}
	if (focused) {
		for (const part of wall.querySelectorAll('[data-key]')) {
			if (part instanceof HTMLElement && part.dataset.key === focused) part.focus({ preventScroll: true });
		}
	}
	localTimes(wall);
	toNewest(wall);
}

async function look() {
	if (!wall || document.hidden) return;
	const query = new URLSearchParams({ version: wall.dataset.version ?? '', find: wall.dataset.find ?? '' });
	const response = await fetch(`/wall?${query}`);
	if (response.status !== 200) return;
	wall.dataset.version = response.headers.get('x-version') ?? '';
	replaceWall(await response.text());
}

document.addEventListener('submit', (event) => {
	const form = event.target;
	if (!(form instanceof HTMLFormElement) || !form.classList.contains('answer')) return;
	event.preventDefault();
	const body = new URLSearchParams();
	for (const [name, value] of new FormData(form, event.submitter)) body.append(name, String(value));
	for (const field of form.querySelectorAll('input[data-key]'))
		if (field instanceof HTMLInputElement) field.value = '';
	fetch('/answer', { method: 'POST', body }).then(look, () => {});
});

localTimes(document);
toNewest(document);
setInterval(() => {
	look().catch(() => {});
}, EVERY_MILLISECONDS);
