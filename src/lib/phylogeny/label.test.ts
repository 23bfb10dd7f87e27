import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { labelShown, labelSpelling } from './label.ts';

// By hand, from the Newick rules: an unquoted underscore is a blank, a doubled quote inside quotes is one quote.
describe('labelShown', () => {
	it.each([
		['Homo_sapiens', 'Homo sapiens'],
		["'Homo_sapiens'", 'Homo_sapiens'],
		["'O''Brien'", "O'Brien"],
		['"Tip_1"', 'Tip_1'],
		['"say ""x"""', 'say "x"'],
		["'broken\r\n  over lines'", 'broken over lines'],
		["''", ''],
		['', '']
	])('shows %s as %s', (raw, shown) => expect(labelShown(raw)).toBe(shown));
});

describe('labelSpelling', () => {
	it('keeps the given spelling where it is standard', () => {
		expect(labelSpelling('Homo sapiens', 'Homo_sapiens')).toBe('Homo_sapiens');
		expect(labelSpelling('Homo sapiens', "'Homo sapiens'")).toBe("'Homo sapiens'");
	});

	it('writes a double-quoted label with single quotes', () => expect(labelSpelling('Tip_1', '"Tip_1"')).toBe("'Tip_1'"));

	it('quotes a label that was changed since it was read', () => expect(labelSpelling('new name', 'old')).toBe("'new name'"));

	it('spells any label without a line break so that it is shown as itself', () => {
		const label = fc.string({ unit: 'grapheme' }).filter((text) => !/[\r\n]/.test(text));
		fc.assert(
			fc.property(label, (text) => {
				expect(labelShown(labelSpelling(text, ''))).toBe(text);
			})
		);
	});
});
