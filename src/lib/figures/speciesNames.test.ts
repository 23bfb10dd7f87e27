import { describe, expect, it } from 'vitest';
import { figureNames, spanName } from './speciesNames.ts';
import { fitText, textWidth } from './textWidth.ts';

describe('figureNames', () => {
	it('shortens the genus and shows blanks for underscores', () => {
		expect(figureNames(['Lychnorana_mirabilis', 'Lychnorana lucens'], true)).toEqual(['L. mirabilis', 'L. lucens']);
	});

	it('shortens no genus where two share an initial', () => {
		expect(figureNames(['Rana a', 'Rhacophorus b', 'Bufo c'], true)).toEqual(['Rana a', 'Rhacophorus b', 'Bufo c']);
	});

	it('keeps a name of one word, and every name when asked', () => {
		expect(figureNames(['A', 'Rana b'], true)).toEqual(['A', 'R. b']);
		expect(figureNames(['Rana b'], false)).toEqual(['Rana b']);
	});
});

describe('spanName', () => {
	it('calls a clade by its first and last epithet in one genus', () => {
		expect(spanName(['Rana a', 'Rana b', 'Rana c'], 0, 1)).toBe('a–b');
	});

	it('keeps the genera where there are several', () => {
		expect(spanName(['Rana a', 'Bufo b'], 0, 1)).toBe('R. a–B. b');
	});
});

describe('textWidth', () => {
	// Published Arial widths: i 222, W 944 thousandths.
	it('adds the widths of the letters', () => {
		expect(textWidth('iW', 10)).toBeCloseTo(11.66, 10);
	});

	it('takes a letter with an accent for as wide as the letter', () => {
		expect(textWidth('é', 10)).toBe(textWidth('e', 10));
	});
});

describe('fitText', () => {
	it('cuts only what does not fit, and says so', () => {
		expect(fitText('mirabilis', 10, 100)).toBe('mirabilis');
		const cut = fitText('mirabilis', 10, 30);
		expect(cut.endsWith('…')).toBe(true);
		expect(textWidth(cut, 10)).toBeLessThanOrEqual(30);
	});
});
