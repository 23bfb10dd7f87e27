import { nodeAges } from '#lib/phylogeny/nodeAges.ts';
import { pruneTree } from '#lib/phylogeny/pruneTree.ts';
import { tipIndices } from '#lib/phylogeny/tree.ts';
import type { PreparedAnalysis } from './prepareAnalysis.ts';

/** Thousands of simulations of so many species take about two seconds; the time grows with the square of their number. */
export const MOST_SIMULATED = 120;

type Simulated = Pick<PreparedAnalysis, 'tree' | 'ages' | 'species' | 'overlap'>;

/**
 * The species whose niches are simulated: all of them, or of a large tree some that stand at even steps in tree order,
 * which the overlaps have no part in choosing. Simulated on fewer species ranges are wider and power is lower.
 */
export function simulatedSpecies({ tree, ages, species, overlap }: Simulated): Simulated {
	const count = species.length;
	if (count <= MOST_SIMULATED) return { tree, ages, species, overlap };
	const kept = Array.from({ length: MOST_SIMULATED }, (_, i) => Math.floor((i * count) / MOST_SIMULATED));
	const tips = tipIndices(tree);
	const thinned = pruneTree(
		tree,
		kept.map((position) => tips[position] ?? -1)
	);
	return {
		tree: thinned,
		ages: nodeAges(thinned),
		species: kept.map((position) => species[position] ?? ''),
		overlap: Float64Array.from(kept.flatMap((row) => kept.map((column) => overlap[row * count + column] ?? Number.NaN)))
	};
}
