import { describe, expect, it } from 'vitest';
import { headlineWords, type HeadlineFigures } from './headlineWords.ts';

const within = { pLess: 0.0321, pGreater: 0.968, pTwoSided: 0.0642, exact: false, count: 9999 };
const figures: HeadlineFigures = { slope: -0.0163241, p: 0.0016, exact: false, count: 9999, within };
const asked = { alternative: 'less', ageUnit: 'Ma' } as const;

// Expected texts by hand from the rounding rules of numbers.ts.
describe('headlineWords', () => {
	it('writes slope, p and p within the deepest split', () => {
		expect(headlineWords(figures, asked)).toEqual({ slope: '−0.0163 per Myr', p: '= 0.0016', within: '= 0.032' });
	});

	it('takes the tail that was asked about within the deepest split', () => {
		expect(headlineWords(figures, { ...asked, alternative: 'greater' }).within).toBe('= 0.97');
		expect(headlineWords(figures, { ...asked, alternative: 'two-sided' }).within).toBe('= 0.064');
	});

	it('says that a test is exact, and then never hides behind a floor', () => {
		const exact = { ...figures, p: 1 / 12, exact: true, count: 24, within: { ...within, pLess: 1 / 3, exact: true, count: 6 } };
		expect(headlineWords(exact, asked)).toMatchObject({ p: '= 0.083, exact', within: '= 0.33, exact' });
	});

	// The smallest two-sided p of m shuffles is 2 / (m + 1).
	it('stands at the floor of the tails that count', () => {
		expect(headlineWords({ ...figures, p: 1e-4 }, asked).p).toBe('≤ 0.0001');
		expect(headlineWords({ ...figures, p: 2e-4 }, { ...asked, alternative: 'two-sided' }).p).toBe('≤ 0.0002');
		expect(headlineWords({ ...figures, p: 2e-4 }, asked).p).toBe('= 0.00020');
	});

	it('says where nothing could be shuffled within the deepest split', () => {
		expect(headlineWords({ ...figures, within: null }, asked).within).toBe('not tested');
	});
});
