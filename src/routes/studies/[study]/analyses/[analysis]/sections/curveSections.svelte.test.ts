import { cleanup, fireEvent, render, screen } from '@testing-library/svelte';
import { afterEach, describe, expect, it } from 'vitest';
import { microResult } from '#lib/analysis/microResult.fixture.ts';
import { findingsView } from '../findingsView.ts';
import AgeClasses from './AgeClasses.svelte';
import Fall from './Fall.svelte';
import Influence from './Influence.svelte';
import Power from './Power.svelte';

afterEach(cleanup);

const findings = findingsView(microResult());
const cells = () => screen.getAllByRole('row').map((row) => Array.from(row.children, (cell) => cell.textContent?.trim()));

// The worked example of four species: AB .8 at 1; AC .7, BC .6 at 2; AD, BD .4, CD .5 at 4.
describe('AgeClasses', { timeout: 30_000 }, () => {
	it('draws the classes, tells them as a table, and answers what pairs of one age have shown', async () => {
		render(AgeClasses, { props: { findings } });
		expect(screen.getByRole('img').getAttribute('aria-label')).toContain('Mean overlap is 0.80 where species parted at 1.00 Ma');
		expect(screen.getByText(/overlap 0.80, 1 pair, 1 node; no more is known/)).toBeTruthy();
		await fireEvent.input(screen.getByLabelText('to age'), { target: { value: '2' } });
		expect(screen.getByText(/overlap 0.60 to 0.80, 3 pairs, 2 nodes/)).toBeTruthy();
		await fireEvent.input(screen.getByLabelText('from age'), { target: { value: '3' } });
		expect(screen.getByText(/The first age is the younger/)).toBeTruthy();
	});
});

describe('Fall', () => {
	it('names a curve for each number of axes and tells where it passes one half', () => {
		render(Fall, { props: { findings } });
		for (const name of ['1 axis', '2 axes', '4 axes']) expect(screen.getByText(name)).toBeTruthy();
		// Half-overlap age 3.8059 by R, see the tests of the fit.
		expect(cells()[1]?.slice(0, 2)).toEqual(['1', 'at 3.81 Ma']);
	});
});

describe('Influence', () => {
	it('lists the slope without each species and marks the one that moves it most', () => {
		render(Influence, { props: { findings } });
		expect(
			cells()
				.slice(1)
				.map((row) => row.slice(0, 2))
		).toEqual([
			['A\u00a0moves it most', '−0.0750'],
			['B', '−0.125'],
			['C', '−0.133'],
			['D', '−0.150']
		]);
	});
});

describe('Power', () => {
	it('tells every statistic over the six walks', () => {
		render(Power, { props: { findings } });
		const [head, ...rows] = cells();
		expect(head?.slice(1)).toEqual([
			'1 axis, θ 0.25',
			'1 axis, θ 1',
			'1 axis, θ 4',
			'2 axes, θ 0.25',
			'2 axes, θ 1',
			'2 axes, θ 4'
		]);
		expect(rows).toHaveLength(5);
		expect(rows[0]?.slice(1)).toEqual(['0 %', '0 %', '0 %', '0 %', '0 %', '0 %']);
	});
});
