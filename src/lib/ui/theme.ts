export const THEME_COOKIE = 'fw-theme';
export type Theme = 'auto' | 'light' | 'dark';
export const THEMES: readonly Theme[] = ['auto', 'light', 'dark'];

/** Reads the cookie's value; anything unknown follows the device. */
export function readTheme(value: string | undefined): Theme {
	return THEMES.find((theme) => theme === value) ?? 'auto';
}
