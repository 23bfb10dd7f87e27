import { formatHex, interpolate } from 'culori';

export type PaletteName = 'kithline' | 'cividis' | 'viridis';
export type Theme = 'light' | 'dark';

/** Every colour a figure uses, as values of SVG attributes. */
export type Palette = {
	readonly paper: string;
	readonly raised: string;
	readonly line: string;
	readonly ink: string;
	readonly secondInk: string;
	readonly overprint: string;
	readonly shuffled: string;
	/** colour of an overlap placed at `share` (0 to 1) of the overlap axis; more overlap is further from paper */
	readonly ramp: (share: number) => string;
};

/** Below this share of the ramp a mark has less than 3:1 contrast with paper and carries an ink hairline (see the test). */
export const PALE_BELOW = 0.55;

const FLAT = {
	light: {
		paper: '#ffffff',
		raised: '#eff3f2',
		line: '#e3e5e6', // ink at 12 % on paper, solid because not every PDF reader blends hairlines alike
		ink: '#16232b',
		secondInk: '#56646c',
		overprint: '#b0115a',
		shuffled: '#74868f'
	},
	dark: {
		paper: '#0f1a20',
		raised: '#16242c',
		line: '#2d363b', // paper text colour at 14 %
		ink: '#e8eef0',
		secondInk: '#9fb0b8',
		overprint: '#ff6fa9',
		shuffled: '#8a9aa3'
	}
} as const;

const KITHLINE = ['#ddebe3', '#b4d8cb', '#86c2b7', '#308f95', '#145b74', '#0e2a42'];
/** Reversed in lightness, so that more overlap is further from dark paper too. */
const KITHLINE_DARK = ['#1d3a4a', '#1f5468', '#2a7f88', '#5fb0a6', '#a5d6c6', '#e3f3ea'];
/** Low to high overlap on white: the published order reversed, so that yellow, the nearest to paper, is the least. */
const VIRIDIS = ['#fde725', '#addc30', '#5ec962', '#28ae80', '#21918c', '#2c728e', '#3b528b', '#472d7b', '#440154'];
const CIVIDIS = ['#fdea45', '#e2cb5c', '#bbaf71', '#9a9478', '#7f7c75', '#62646f', '#3c4d6e', '#11366c', '#002051'];

const STOPS: Readonly<Record<PaletteName, readonly string[]>> = { kithline: KITHLINE, viridis: VIRIDIS, cividis: CIVIDIS };

/** Colours as written values, for exports and for anything that cannot read the page's tokens. Interpolated in OKLab. */
export function writtenPalette(name: PaletteName = 'kithline', theme: Theme = 'light'): Palette {
	const onDark = name === 'kithline' ? KITHLINE_DARK : STOPS[name].toReversed();
	const stops = theme === 'dark' ? onDark : [...STOPS[name]];
	const between = interpolate(stops, 'oklab');
	return { ...FLAT[theme], ramp: (share) => formatHex(between(Math.min(1, Math.max(0, share)))) ?? FLAT[theme].ink };
}

/**
 * Colours as the page's tokens (src/app.css): both themes follow without script. Between two tokens of the ramp the
 * browser mixes in OKLab, as `writtenPalette` does.
 */
export const pagePalette: Palette = {
	paper: 'var(--paper)',
	raised: 'var(--raised)',
	line: 'var(--line)',
	ink: 'var(--ink)',
	secondInk: 'var(--second-ink)',
	overprint: 'var(--overprint)',
	shuffled: 'var(--shuffled)',
	ramp(share) {
		const place = Math.min(1, Math.max(0, share)) * (KITHLINE.length - 1);
		const lower = Math.min(KITHLINE.length - 2, Math.floor(place));
		const part = Math.round((place - lower) * 100);
		if (part === 0) return `var(--ramp-${lower + 1})`;
		return `color-mix(in oklab, var(--ramp-${lower + 2}) ${part}%, var(--ramp-${lower + 1}))`;
	}
};
