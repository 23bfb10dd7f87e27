import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { editDistance, isSwap, spellingDifference } from './spelling.ts';

/** The textbook recurrence without any shortcut, as the measure to compare with. */
function plainDistance(a: string, b: string): number {
	const d = Array.from({ length: a.length + 1 }, (_, i) =>
		Array.from({ length: b.length + 1 }, (__, j) => (i === 0 ? j : j === 0 ? i : 0))
	);
	const at = (i: number, j: number) => d[i]?.[j] ?? Infinity;
	for (let i = 1; i <= a.length; i++) {
		for (let j = 1; j <= b.length; j++) {
			const swap = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1] ? at(i - 2, j - 2) + 1 : Infinity;
			d[i]?.splice(j, 1, Math.min(at(i - 1, j) + 1, at(i, j - 1) + 1, at(i - 1, j - 1) + (a[i - 1] === b[j - 1] ? 0 : 1), swap));
		}
	}
	return at(a.length, b.length);
}

describe('editDistance', () => {
	// By hand: one insertion; one swap; swap and insertion; a stretch is not edited twice (ca → abc is 3, not 2).
	it.each([
		['palida', 'pallida', 1],
		['palldia', 'pallida', 1],
		['apllid', 'pallida', 2],
		['ca', 'abc', 3],
		['', 'ab', 2]
	])('of %j and %j is %i', (a, b, distance) => {
		expect(editDistance(a, b, 3)).toBe(distance);
	});

	it('is that of the plain recurrence, cut off above the limit', () => {
		const word = fc.stringMatching(/^[abc]{0,9}$/);
		fc.assert(
			fc.property(word, word, fc.integer({ min: 0, max: 4 }), (a, b, limit) => {
				expect(editDistance(a, b, limit)).toBe(Math.min(plainDistance(a, b), limit + 1));
			}),
			{ numRuns: 2000 }
		);
	});
});

describe('isSwap', () => {
	it('knows a swap of neighbours from other changes', () => {
		expect(isSwap('palldia', 'pallida')).toBe(true);
		expect(isSwap('pallido', 'pallida')).toBe(false);
		expect(isSwap('dallipa', 'pallida')).toBe(false);
	});
});

describe('spellingDifference', () => {
	// By hand: of two equal letters the second counts as added.
	it('marks what one side has and the other has not, in the names as written', () => {
		expect(spellingDifference('Una_palida', 'Una pallida Orr')).toEqual({
			species: [],
			tip: [
				[7, 8],
				[11, 15]
			]
		});
		expect(spellingDifference('Una alto', 'una alta')).toEqual({ species: [[7, 8]], tip: [[7, 8]] });
	});

	it('leaves the same letters when the marked ones are taken away', () => {
		const word = fc.stringMatching(/^[abc]{0,9}$/);
		const without = (text: string, ranges: readonly (readonly [number, number])[]) =>
			[...text].filter((_, i) => !ranges.some(([start, end]) => i >= start && i < end)).join('');
		fc.assert(
			fc.property(word, word, (a, b) => {
				const { species, tip } = spellingDifference(a, b);
				expect(without(a, species)).toBe(without(b, tip));
			})
		);
	});
});
