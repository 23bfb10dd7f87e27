import { wcagContrast } from 'culori';
import { describe, expect, it } from 'vitest';
import { PALE_BELOW, pagePalette, writtenPalette, type PaletteName } from './palette.ts';

const names: PaletteName[] = ['kithline', 'cividis', 'viridis'];

describe('writtenPalette', () => {
	it('begins and ends with the colours of the design', () => {
		const { ramp } = writtenPalette();
		expect([ramp(0), ramp(1)]).toEqual(['#ddebe3', '#0e2a42']);
	});

	// Property: the design asks for more overlap further from paper, and for a hairline on marks under 3:1.
	it.each(names.flatMap((name) => [[name, 'light'] as const, [name, 'dark'] as const]))(
		'moves away from paper all along: %s, %s',
		(name, theme) => {
			const { ramp, paper } = writtenPalette(name, theme);
			const contrasts = Array.from({ length: 21 }, (_, step) => wcagContrast(ramp(step / 20), paper));
			for (const [step, contrast] of contrasts.entries())
				if (step > 0) expect(contrast).toBeGreaterThanOrEqual((contrasts[step - 1] ?? 0) - 0.02);
			for (const [step, contrast] of contrasts.entries()) if (step / 20 >= PALE_BELOW) expect(contrast).toBeGreaterThanOrEqual(3);
		}
	);

	it.each(['light', 'dark'] as const)('prints its words with at least 4.5:1 on %s paper', (theme) => {
		const { paper, ink, secondInk, overprint } = writtenPalette('kithline', theme);
		for (const colour of [ink, secondInk, overprint]) expect(wcagContrast(colour, paper)).toBeGreaterThanOrEqual(4.5);
	});
});

describe('pagePalette', () => {
	it('mixes the two neighbouring tokens of the ramp', () => {
		expect(pagePalette.ramp(0)).toBe('var(--ramp-1)');
		expect(pagePalette.ramp(1)).toBe('color-mix(in oklab, var(--ramp-6) 100%, var(--ramp-5))');
		expect(pagePalette.ramp(0.3)).toBe('color-mix(in oklab, var(--ramp-3) 50%, var(--ramp-2))');
	});
});
