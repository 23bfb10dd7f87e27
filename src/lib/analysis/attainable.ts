import { automorphismLog } from '#lib/phylogeny/automorphisms.ts';
import { nodeAges } from '#lib/phylogeny/nodeAges.ts';
import { pruneTree } from '#lib/phylogeny/pruneTree.ts';
import { tipIndices, type Tree } from '#lib/phylogeny/tree.ts';
import { lnArrangementCount } from '#lib/statistics/arrangements.ts';
import type { PermutationDesign } from '#lib/statistics/permutationDesign.ts';
import { smallestAttainableP } from '#lib/statistics/permutationPValue.ts';

type Runs = { readonly exact: boolean; readonly shuffles: number };

/** The smallest one-sided p that any overlaps on this tree could give when every species may stand anywhere. */
export function smallestFreeP(tree: Tree, ages: Float64Array, design: PermutationDesign, runs: Runs): number {
	return smallestAttainableP({
		...runs,
		lnArrangements: lnArrangementCount(design.free),
		lnAutomorphisms: automorphismLog(tree, ages).log
	});
}

/** The same within the deepest split: its own group of relabellings, and only the symmetries that keep each side. */
export function smallestWithinP(tree: Tree, design: PermutationDesign, runs: Runs): number {
	const tips = tipIndices(tree);
	let lnAutomorphisms = 0;
	for (const { from, to } of design.within) {
		const side = pruneTree(tree, tips.slice(from, to));
		lnAutomorphisms += automorphismLog(side, nodeAges(side)).log;
	}
	return smallestAttainableP({ ...runs, lnArrangements: lnArrangementCount(design.within), lnAutomorphisms });
}
