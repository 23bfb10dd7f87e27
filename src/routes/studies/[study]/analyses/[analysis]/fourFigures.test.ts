import { describe, expect, it } from 'vitest';
import { exampleTold } from './exampleTold.ts';
import { fourFigures } from './fourFigures.ts';

const values = (told: typeof exampleTold) => fourFigures(told).map(({ value }) => value);

// The expected texts are written by hand from the numbers of the example, in the words of the page.
describe('fourFigures', () => {
	it('shows slope, p, p within the deepest split, species and the share at the root', () => {
		expect(values(exampleTold)).toEqual(['−0.0163', '= 0.0016', '= 0.032', '26']);
		expect(fourFigures(exampleTold)[3].note).toBe('27 % of their pairs meet at the root');
	});

	it('puts the other tail and the error beside p', () => {
		expect(fourFigures(exampleTold)[1]).toMatchObject({ label: 'p, falls', note: 'rises 0.999 · ± 0.0006' });
	});

	// 1 / (99,999 + 1) is the floor of 99,999 shuffles, so a p there can only be bounded.
	it('bounds p at the floor of the shuffles', () => {
		const permutation = { ...exampleTold.permutation, count: 99_999, asExtreme: 0, p: 1e-5, pLess: 1e-5 };
		expect(values({ ...exampleTold, permutation })[1]).toBe('≤ 0.00001');
	});

	it('shows an exact p as it is', () => {
		const permutation = { ...exampleTold.permutation, exact: true, count: 24, pLess: 1 / 3 };
		expect(fourFigures({ ...exampleTold, permutation })[1]).toMatchObject({ value: '= 0.33', note: 'rises 0.999 · exact' });
	});

	it('says when the deepest split could not be tested', () => {
		const permutation = { ...exampleTold.permutation, withinDeepestSplit: null };
		expect(values({ ...exampleTold, permutation }).slice(2)).toEqual(['not tested', '26']);
		expect(fourFigures({ ...exampleTold, permutation })[3].note).toBe('25 different ages');
	});
});
