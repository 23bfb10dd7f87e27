import { describe, expect, it } from 'vitest';
import { treeShape } from '../agedTree.ts';
import { drawnOverlap, exampleTree } from '../exampleTrees.ts';
import { nextNormal, type RandomStream, randomStream } from '../randomStream.ts';
import { cladesOf } from './cladeList.ts';
import { testClades } from './testClades.ts';

/*
 * How often clades are flagged where nothing, or only their parent, is to be found. Simulated with a seed, so a failure
 * is a change of the method and not of luck. Bounds are 4 binomial standard errors.
 */
const TRIALS = 200;
const standardError = (share: number) => Math.sqrt((share * (1 - share)) / TRIALS);

// Ten species a–j in one clade whose halves a–e and f–j are clades, and ten more k–t on their own side.
const half = (letters: string) =>
	[...letters.slice(1)].reduce((tree, name, i) => `(${tree}:1,${name}:${i + 1})`, letters.slice(0, 1));
const newick = `((${half('abcde')}:3,${half('fghij')}:3):4,(${half('klmno')}:3,${half('pqrst')}:3):4);`;
const tree = exampleTree(newick);
const shape = treeShape(tree);
const groups = cladesOf(shape, 5).filter(({ members }) => members.length === 5);
const asked = { tree, groups, permutations: 99, alpha: 0.05 };

/** Overlap .5, more by `shift` among the first ten species, with normal noise of .1. */
function alikeParent(stream: RandomStream, shift: number): Float64Array {
	const overlap = new Float64Array(400).fill(1);
	for (let a = 0; a < 20; a++) {
		for (let b = 0; b < a; b++) {
			const value = 0.5 + (a < 10 ? shift : 0) + 0.1 * nextNormal(stream);
			overlap[20 * a + b] = value;
			overlap[20 * b + a] = value;
		}
	}
	return overlap;
}

function rates(shift: number) {
	const stream = randomStream(shift * 100, 0, 8);
	const flagged = { free: 0, beyond: 0, anyFree: 0, anyBeyond: 0 };
	for (let trial = 0; trial < TRIALS; trial++) {
		const { clades } = testClades({ ...asked, overlap: alikeParent(stream, shift), seed: trial });
		const [first] = clades;
		if ((first?.p ?? 1) <= 0.05) flagged.free++;
		if ((first?.beyond?.p ?? 1) <= 0.05) flagged.beyond++;
		if (clades.some(({ pAdjusted }) => pAdjusted <= 0.05)) flagged.anyFree++;
		if (clades.some(({ beyond }) => (beyond?.pAdjusted ?? 1) <= 0.05)) flagged.anyBeyond++;
	}
	return flagged;
}

describe('errors of the clade test', () => {
	// A clade without structure of its own inside an alike parent: methods tell 90 % flagged by the test on the whole tree.
	it('flags a clade for its parent’s sake on the whole tree, and about α of the time beyond the parent', () => {
		const { free, beyond, anyBeyond } = rates(0.2);
		expect(free / TRIALS).toBeGreaterThan(0.85);
		expect(beyond / TRIALS).toBeLessThan(0.05 + 4 * standardError(0.05));
		expect(beyond / TRIALS).toBeGreaterThan(0.05 - 4 * standardError(0.05));
		// None of the four clades differs from the rest of its parent, so any claim is a false one.
		expect(anyBeyond / TRIALS).toBeLessThan(0.05 + 4 * standardError(0.05));
	});

	it('flags any of the clades in about α of trials where species are exchangeable', () => {
		const { anyFree, anyBeyond } = rates(0);
		expect(anyFree / TRIALS).toBeLessThan(0.05 + 4 * standardError(0.05));
		expect(anyFree / TRIALS).toBeGreaterThan(0.05 - 4 * standardError(0.05));
		expect(anyBeyond / TRIALS).toBeLessThan(0.05 + 4 * standardError(0.05));
	});

	// Property: p of an exchangeable clade is at most α with probability at most α, for every α.
	it('has p-values no smaller than uniform ones where species are exchangeable', () => {
		const p = Array.from({ length: TRIALS }, (_, trial) => {
			const overlap = drawnOverlap(20, randomStream(trial, 0, 9), 2);
			return testClades({ ...asked, overlap, seed: trial }).clades[0]?.p ?? 0;
		});
		for (const level of [0.05, 0.1, 0.25, 0.5]) {
			const share = p.filter((value) => value <= level).length / TRIALS;
			expect(share).toBeLessThan(level + 4 * standardError(level));
		}
	});
});
