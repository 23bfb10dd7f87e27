import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { automorphismLog } from './automorphisms.ts';
import { mrcaAges } from './mrcaAges.ts';
import { parseNewick } from './newick.ts';
import { nodeAges } from './nodeAges.ts';
import { nestedText, nestedTrees } from '../../../tests/reference/nestedTrees.ts';
import { type Tree, tipIndices } from './tree.ts';

function only(text: string): Tree {
	const tree = parseNewick(text).trees[0]?.tree;
	if (tree === undefined) throw new Error('the text holds a tree');
	return tree;
}
const symmetries = (tree: Tree) => automorphismLog(tree, nodeAges(tree));

/** Every relabelling tried against the matrix itself, dropping a beginning as soon as it disagrees. */
function tried(tree: Tree): number {
	const count = tipIndices(tree).length;
	const ages = mrcaAges(tree, nodeAges(tree));
	const extend = (chosen: number[]): number => {
		if (chosen.length === count) return 1;
		const row = chosen.length;
		let sum = 0;
		for (let tip = 0; tip < count; tip++) {
			const agrees =
				!chosen.includes(tip) && chosen.every((other, column) => ages[tip * count + other] === ages[row * count + column]);
			if (agrees) sum += extend([...chosen, tip]);
		}
		return sum;
	};
	return extend([]);
}

describe('automorphismLog', () => {
	// By hand, by the rules of smallest attainable p: 2 per cherry, q! per polytomy, 2 per pair of alike sisters.
	it.each([
		['(((A:1,B:1):1,C:2):1,D:3);', 2],
		['((A:1,B:1):3,(C:2,D:2):2);', 4],
		['((A:1,B:1):1,(C:1,D:1):1);', 8],
		['(A:1,B:1,C:1,D:1,E:1);', 120],
		['((A:1,B:1):0,C:1);', 6], // a branch of length 0 is no split
		['(((A:1,B:1):1):1,C:3);', 2],
		['((A:1,B:1):1,(C:0.5,D:0.5):1);', 8] // the inner ages agree; tips that end early do not matter
	])('of %s is the logarithm of %d', (text, count) => {
		const found = symmetries(only(text));
		expect(found.count).toBe(count);
		expect(found.log).toBeCloseTo(Math.log(count), 12);
	});

	it('agrees with trying every relabelling', () => {
		const small = nestedTrees(fc.integer({ min: 0, max: 1 }))
			.map((nested) => only(`${nestedText(nested)};`))
			.filter((tree) => tipIndices(tree).length <= 7);
		fc.assert(
			fc.property(small, (tree) => {
				expect(symmetries(tree).count).toBe(tried(tree));
			})
		);
	});

	it('takes ages that differ only by rounding as one age', () => {
		// 0.1 + 0.2 is not 0.3: the two cherries are 4e-17 apart.
		expect(symmetries(only('(((A:1,B:1):0.2):0.1,(C:1,D:1):0.3);')).count).toBe(8);
		expect(symmetries(only('((A:1,B:1):0.30001,(C:1,D:1):0.3);')).count).toBe(4);
	});

	it('gives no count beyond what a double holds exactly', () => {
		const star = (tips: number) => only(`(${Array.from({ length: tips }, (_, i) => `t${i}:1`).join()});`);
		expect(symmetries(star(18)).count).toBe(6_402_373_705_728_000); // 18!
		const { log, count } = symmetries(star(19));
		expect(count).toBeNull();
		expect(log).toBeCloseTo(Math.log(121_645_100_408_832_000), 10); // 19!
	});

	it('copes with a deep caterpillar', () => {
		const inner = Array.from({ length: 9_998 }, (_, i) => `:1,t${i}:${i + 2})`).join('');
		expect(symmetries(only(`${'('.repeat(9_999)}x:1,y:1)${inner};`)).count).toBe(2);
	});

	it('refuses an age that is no number', () => {
		expect(() => automorphismLog(only('(A:1,B:1);'), Float64Array.of(NaN, 0, 0))).toThrow(
			'Expected ages[0] to be a finite number; got NaN.'
		);
	});
});
