/** An address with only those choices that were made. */
export function addressOf(
	path: string,
	choices: Readonly<Record<string, string | number | null | undefined>>
): string {
	const query = new URLSearchParams();
	for (const [name, value] of Object.entries(choices)) {
		if (value !== null && value !== undefined && value !== '') query.set(name, String(value));
	}
	const text = query.toString();
	return text === '' ? path : `${path}?${text}`;
}
