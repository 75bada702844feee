import type { Config } from 'tailwindcss';
import forms from '@tailwindcss/forms';

export default {
	content: ['./src/**/*.{html,svelte,ts}'],
	plugins: [forms({ strategy: 'class' })]
} satisfies Config;
