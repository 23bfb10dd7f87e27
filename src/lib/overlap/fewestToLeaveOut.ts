import { pairValue, type PairMatrix } from './pairMatrix.ts';
import { smallestCover } from './smallestCover.ts';

/** Up to this many species in one tangle of missing pairs the fewest are found for certain, beyond it by a rule of thumb. */
const EXACT_LIMIT = 60;

export type LeaveOut = {
	/** in the order of the matrix */
	readonly species: readonly string[];
	/** whether fewer are certain not to suffice */
	readonly exact: boolean;
};

/**
 * The fewest species to leave out so that every remaining pair has a value: a smallest vertex cover of the graph of
 * missing pairs. A species with one missing pair is never left out before its partner. What then remains is solved exactly
 * by branch and bound up to 60 species that hang together; beyond, the species with most missing pairs goes first until
 * none is missing. The same matrix gives the same answer.
 *
 * @returns species to leave out, none when no pair is missing. Cost: quadratic in the species, exponential in the 60.
 */
export function fewestToLeaveOut(matrix: PairMatrix): LeaveOut {
	const cover = smallestCover(missingPairs(matrix), EXACT_LIMIT);
	const vertices = [...cover.vertices].sort((a, b) => a - b);
	return { species: vertices.map((vertex) => matrix.species[vertex] ?? ''), exact: cover.exact };
}

function missingPairs(matrix: PairMatrix): Map<number, Set<number>> {
	const graph = new Map<number, Set<number>>();
	const n = matrix.species.length;
	const link = (a: number, b: number) => {
		const neighbours = graph.get(a) ?? new Set();
		graph.set(a, neighbours.add(b));
	};
	for (let i = 0; i < n; i++) {
		for (let j = i + 1; j < n; j++) {
			if (!Number.isNaN(pairValue(matrix, i, j))) continue;
			link(i, j);
			link(j, i);
		}
	}
	return graph;
}
