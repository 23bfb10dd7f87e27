import type { Config } from 'tailwindcss';

/** The colours are tokens of src/app.css, which holds both themes; this file gives them their utility names. */
export default {
	content: ['./src/**/*.{html,svelte,ts}'],
	theme: {
		extend: {
			colors: {
				paper: 'var(--paper)',
				raised: 'var(--raised)',
				line: 'var(--line)',
				ink: 'var(--ink)',
				second: 'var(--second-ink)',
				water: 'var(--water)',
				overprint: 'var(--overprint)',
				shuffled: 'var(--shuffled)',
				settle: 'var(--settle)',
				look: 'var(--look)',
				settled: 'var(--settled)'
			},
			fontFamily: {
				sans: ['var(--font-sans)'],
				serif: ['var(--font-serif)']
			}
		}
	}
} satisfies Config;
