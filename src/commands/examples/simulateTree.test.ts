import { describe, expect, it } from 'vitest';
import { innerNodes, tipNames } from './clade.ts';
import { randomNumbers } from './randomNumbers.ts';
import { simulateTree } from './simulateTree.ts';

const names = [...'abcdefgh'];
const PLAN = { names, rootAgeMa: 10, speciationPerMyr: 0.2, extinctionPerMyr: 0.05, smallerSide: [2, 3] } as const;

describe('simulateTree', () => {
	const trees = Array.from({ length: 200 }, (_, seed) => simulateTree(PLAN, randomNumbers(seed, 'trees')));

	it('grows the asked number of named species, a root of the asked age and a root split of the asked shape', () => {
		for (const tree of trees) {
			expect(tipNames(tree).sort()).toEqual(names);
			expect(tree.ageMa).toBe(10);
			const [smaller = 0] = tree.daughters.map((side) => tipNames(side).length);
			expect([2, 3]).toContain(smaller); // ladderised: the smaller side comes first
		}
	});

	it('puts every node below its parent and above the present', () => {
		for (const tree of trees) {
			for (const node of innerNodes(tree)) {
				expect(node.daughters).toHaveLength(2);
				for (const daughter of node.daughters) expect(daughter.ageMa).toBeLessThan(node.ageMa);
			}
		}
	});

	// Without extinction the ages below a root of age T, with the number of species given, are independent with distribution
	// (1 - exp(-λ s)) / (1 - exp(-λ T)) (Nee, May & Harvey 1994, doi:10.1098/rstb.1994.0068), so their mean is
	// 1/λ - T exp(-λ T) / (1 - exp(-λ T)) = 5 - 10 e^-2 / (1 - e^-2) = 3.4348 for λ = 0.2, T = 10. The s.d. of one is
	// below 2.9 (that of a uniform on 0–10): 4 standard errors of 200 × 6 ages are under 0.34.
	it('spreads the node ages as a pure birth process does', () => {
		const pureBirth = { ...PLAN, extinctionPerMyr: 0, smallerSide: [1, 4] } as const;
		const grown = Array.from({ length: 200 }, (_, seed) => simulateTree(pureBirth, randomNumbers(seed, 'pure birth')));
		const ages = grown.flatMap((tree) => innerNodes(tree).slice(1)).map(({ ageMa }) => ageMa);
		expect(ages).toHaveLength(1200);
		expect(Math.abs(ages.reduce((sum, age) => sum + age, 0) / ages.length - 3.4348)).toBeLessThan(0.34);
	});

	it('says so when no tree can be had', () => {
		const impossible = { ...PLAN, speciationPerMyr: 1e-9, extinctionPerMyr: 0 };
		expect(() => simulateTree(impossible, randomNumbers(1, 'trees'))).toThrow('No tree of 8 species');
	});
});
