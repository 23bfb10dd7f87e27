import { describe, expect, it } from 'vitest';
import { nameSegments } from './nameSegments.ts';

describe('nameSegments', () => {
	// By hand: the second l of pallida is the letter that palida lacks.
	it('cuts a name at its differing letters and loses none', () => {
		const segments = nameSegments('pallida', [[3, 4]]);
		expect(segments).toEqual([
			{ text: 'pal', differs: false },
			{ text: 'l', differs: true },
			{ text: 'ida', differs: false }
		]);
	});

	it('keeps a name whole without differences, and one that differs to its end', () => {
		expect(nameSegments('alba', [])).toEqual([{ text: 'alba', differs: false }]);
		expect(nameSegments('alba x', [[4, 6]]).map(({ text }) => text)).toEqual(['alba', ' x']);
	});
});
