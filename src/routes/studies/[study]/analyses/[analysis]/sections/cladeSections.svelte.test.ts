import { cleanup, fireEvent, render, screen } from '@testing-library/svelte';
import { afterEach, describe, expect, it } from 'vitest';
import { microResult } from '#lib/analysis/microResult.fixture.ts';
import { findingsView } from '../findingsView.ts';
import AlsoTested from './AlsoTested.svelte';
import Clades from './Clades.svelte';
import Sisters from './Sisters.svelte';

afterEach(cleanup);

// The worked example of four species in exact fractions; see the tests of the blocks.
const findings = findingsView(microResult({ clades: { minTips: 2 }, alsoTest: ['nodes-nested'] }));
const cells = () => screen.getAllByRole('row').map((row) => Array.from(row.children, (cell) => cell.textContent?.trim()));

describe('Clades', { timeout: 30_000 }, () => {
	it('lists every clade with both p-values, sorts them, and gives the reason where none could be marked', async () => {
		render(Clades, { props: { findings } });
		// A, B, C: within .70, with D .43, 6 of 24; below the root p beyond is p. A, B: .8 against .525, 4 of 24; inside ABC 1 of 3.
		expect(cells()[1]).toEqual(['A–C', '3', '2.00', '0.70', '0.43', '0.25', '0.25', '0.25', '–', 'too few ways']);
		expect(cells()[2]?.slice(0, 2)).toEqual(['A–B', '2']);
		await fireEvent.click(screen.getByRole('button', { name: 'Species' }));
		expect(cells()[1]?.[0]).toBe('A–B');
		expect(screen.getByText(/Too few ways to choose 3 of the 4 species/)).toBeTruthy();
	});
});

describe('AlsoTested', () => {
	it('puts the statistic of the plan first and every p beside the adjusted one', () => {
		render(AlsoTested, { props: { findings } });
		expect(cells()[1]?.[0]).toContain('slope over all pairs');
		expect(cells()[1]?.[0]).toContain('judged by');
		// 2 of 24 by either, in the same arrangements; 2 of 6 within the deepest split.
		expect(cells()[2]?.slice(2)).toEqual(['0.083', '0.083', '0.33']);
	});
});

describe('Sisters', () => {
	it('sets the mean of sister species beside that of all other pairs', () => {
		render(Sisters, { props: { findings } });
		expect(cells().slice(1)).toEqual([
			['Sister species', '1', '0.800'],
			['All other pairs', '5', '0.520']
		]);
	});
});
