import { readFileSync } from 'node:fs';

const folder = 'fixtures/real-meadow';

export const meadowTree = readFileSync(`${folder}/meadow-tree.nwk`, 'utf8');
export const meadowMatrix = readFileSync(`${folder}/meadow-overlap-d.csv`, 'utf8');

type Expected = {
	slope: number;
	r: number;
	pLess: number;
	permutations: number;
	withinDeepestSplit: { pLess: number };
	nodesNested: { slope: number };
};
/** Computed in R from published cover classes and divergence ages; origin in fixtures/real-meadow/README.md. */
export const meadowExpected = (JSON.parse(readFileSync(`${folder}/expected.json`, 'utf8')) as { D: Expected }).D;

/** Four standard errors of the difference of two Monte Carlo p values. */
export function monteCarloRoom(p: number, shuffles: number): number {
	return 4 * Math.sqrt(p * (1 - p) * (1 / shuffles + 1 / meadowExpected.permutations));
}
