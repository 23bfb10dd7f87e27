import { describe, expect, it } from 'vitest';
import { placeAt } from './placeAt.ts';

// By hand: counting characters.
describe('placeAt', () => {
	it('starts at line 1, column 1', () => expect(placeAt('abc', 0)).toEqual({ line: 1, column: 1 }));

	it.each(['\n', '\r', '\r\n'])('counts one line for each %j', (end) => {
		expect(placeAt(`a${end}${end}bc`, 2 + 2 * end.length)).toEqual({ line: 3, column: 2 });
	});

	it('gives a byte order mark no column', () => expect(placeAt('\uFEFFab', 2)).toEqual({ line: 1, column: 2 }));

	it('counts a character beyond the first plane once', () => expect(placeAt('𝛼b', 2)).toEqual({ line: 1, column: 2 }));
});
