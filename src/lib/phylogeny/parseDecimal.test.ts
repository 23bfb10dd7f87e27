import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseDecimal } from './parseDecimal.ts';

const parsed = (text: string) => parseDecimal(text, 0, text.length);

describe('parseDecimal', () => {
	const expectAsNumber = (text: string): void => {
		expect(parsed(text)).toBe(Number(text));
	};

	it('gives the same double as Number for every double as printed', () => {
		const anyDouble = fc.double({ noNaN: true, noDefaultInfinity: true });
		fc.assert(
			fc.property(anyDouble, (value) => expectAsNumber(String(value))),
			{ numRuns: 2_000 }
		);
	});

	it('gives the same double as Number for any digits, point and exponent', () => {
		const digits = fc.string({ unit: fc.constantFrom(...'0123456789'), minLength: 1, maxLength: 24 });
		const sign = fc.constantFrom('', '+', '-');
		const part = fc.oneof(
			fc.constantFrom('', '.'),
			digits.map((text) => `.${text}`)
		);
		const exponent = fc.oneof(
			fc.constant(''),
			fc.integer({ min: -340, max: 320 }).map((power) => `e${power}`)
		);
		fc.assert(
			fc.property(fc.tuple(sign, digits, part, exponent), (pieces) => expectAsNumber(pieces.join(''))),
			{ numRuns: 5_000 }
		);
	});

	// The last is 2^53 + 1, which lies halfway between two doubles.
	it.each(['0.1', '1e22', '1e23', '1.0E-01', '+5', '5.', '.5', '123456789012345678', '1e-400', '1e400', '9007199254740993'])(
		'reads %s as Number does',
		(text) => expect(parsed(text)).toBe(Number(text))
	);

	it.each(['', '-', '.', 'x', '1x', '1e', '1e+', '1.2.3', '0x1', 'NaN', 'Infinity', '1e5.5', '1 2', 'e5'])(
		'gives NaN for "%s"',
		(text) => expect(parsed(text)).toBeNaN()
	);

	it('reads only its part of the text', () => expect(parseDecimal('12345', 1, 3)).toBe(23));
});
