import type { Config } from 'tailwindcss';
import forms from '@tailwindcss/forms';

/**
 * Names for the tokens of `src/app.css`. There is no other palette: a colour that is not here has no meaning
 * in this product. `waits` is kept for what waits on somebody, `late` for what is late or dangerous.
 */
export default {
	content: ['./src/**/*.{html,svelte,ts}'],
	theme: {
		extend: {
			colors: {
				transparent: 'transparent',
				current: 'currentColor',
				paper: 'var(--paper)',
				sheet: 'var(--sheet)',
				well: 'var(--well)',
				ink: 'var(--ink)',
				'ink-soft': 'var(--ink-soft)',
				'ink-faint': 'var(--ink-faint)',
				rule: 'var(--rule)',
				'field-edge': 'var(--field-edge)',
				accent: 'var(--accent)',
				'accent-wash': 'var(--accent-wash)',
				'on-ink': 'var(--on-ink)',
				waits: 'var(--waits)',
				'waits-wash': 'var(--waits-wash)',
				'waits-mark': 'var(--waits-mark)',
				late: 'var(--late)',
				'late-wash': 'var(--late-wash)',
				'on-late': 'var(--on-late)',
				lamp: 'var(--lamp)',
				'lamp-wash': 'var(--lamp-wash)'
			},
			fontFamily: {
				sans: ['Atkinson Hyperlegible Next Variable', 'system-ui', 'sans-serif'],
				serif: ['Literata Variable', 'Georgia', 'serif']
			}
		}
	},
	plugins: [forms({ strategy: 'class' })]
} satisfies Config;
