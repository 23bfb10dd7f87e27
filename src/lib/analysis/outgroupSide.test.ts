import { describe, expect, it } from 'vitest';
import { analyse } from './analyse.ts';
import { MICRO_INPUTS, microPlan } from './microResult.fixture.ts';
import { previewAnalysis } from './previewAnalysis.ts';

/** A ladder of so many species a, b, … with a small side of `outgroup` on the other side of the root. */
function inputs(ingroup: string, outgroup: string) {
	const ladder = (letters: string, height: number) =>
		[...letters.slice(1)].reduce((tree, name, i) => `(${tree}:1,${name}:${i + 1})`, letters.slice(0, 1)) +
		`:${height - letters.length + 1}`;
	const species = [...ingroup, ...outgroup];
	const lower = Float64Array.from({ length: (species.length * (species.length - 1)) / 2 }, (_, pair) => ((pair * 7) % 10) / 10);
	const treeText = `(${ladder(ingroup, 20)},${ladder(outgroup, 20)});`;
	return { ...MICRO_INPUTS, treeText, overlap: { species, lower, remarks: [] } };
}
const asked = (ingroup: string, outgroup: string) => {
	const { outgroup: side, remarks } = previewAnalysis(inputs(ingroup, outgroup), microPlan());
	return { side, message: remarks.find(({ code }) => code === 'outgroup-side')?.message };
};

describe('the question about a small side of the root', () => {
	// By hand: 2 of 7 species on one side: 2 · 5 = 10 of 21 pairs, 48 %.
	it('is asked when a small side takes part in more than 40 % of the pairs', () => {
		const { side, message } = asked('abcde', 'xy');
		expect(side).toEqual({ species: ['x', 'y'], rest: ['a', 'b', 'c', 'd', 'e'] });
		expect(message).toBe('10 of 21 pairs meet at the root between x and y and the rest: run also without x and y?');
	});

	// By hand: 2 · 7 = 14 of 36 pairs, 39 %; 1 · 9 of 45, 20 %; 4 · 5 = 20 of 36, 56 %, but 4 of 9 species are no small side.
	it.each([
		['abcdefg', 'xy'],
		['abcdefghi', 'x'],
		['abcde', 'wxyz']
	])('is not asked of %s against %s', (ingroup, outgroup) => {
		expect(asked(ingroup, outgroup)).toEqual({ side: null, message: undefined });
	});

	// By hand: 3 · 3 = 9 of 15 pairs, but three species are fewer than a test needs.
	it('is not asked when too few species would remain', () => {
		expect(asked('abc', 'xyz').side).toBeNull();
	});

	it('stands among the remarks of the result, and is gone from a plan without the side', () => {
		const named = (species: 'shared' | string[]) =>
			analyse(inputs('abcde', 'xy'), microPlan({ species })).remarks.filter(({ code }) => code === 'outgroup-side');
		expect(named('shared')).toMatchObject([{ level: 'look' }]);
		expect(named(['a', 'b', 'c', 'd', 'e'])).toEqual([]);
	});
});
