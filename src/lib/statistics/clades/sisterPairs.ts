import type { TreeShape } from '../agedTree.ts';

export type SisterPairs = {
	/** nodes whose only children are two species */
	readonly cherries: number;
	/** null without a cherry */
	readonly meanCherries: number | null;
	readonly others: number;
	/** null when every pair is a cherry */
	readonly meanOthers: number | null;
};

/**
 * Mean overlap of sister species beside that of all other pairs. A description: sisters are the youngest pairs, so this
 * is the fall of overlap with age told once more, not a second line of evidence, and it gets no p. Three species or
 * more that part at one node are no sisters of each other.
 *
 * @param overlap - shape (n, n), row-major, tips in tree order
 */
export function sisterPairs({ internal, tips, tipFrom, tipTo, children }: TreeShape, overlap: Float64Array): SisterPairs {
	const count = tips.length;
	let sum = 0;
	for (let row = 1; row < count; row++) for (let column = 0; column < row; column++) sum += overlap[row * count + column] ?? 0;
	let sisterSum = 0;
	let cherries = 0;
	for (const node of internal) {
		const from = tipFrom[node] ?? 0;
		if (children[node]?.length !== 2 || (tipTo[node] ?? 0) - from !== 2) continue;
		cherries++;
		sisterSum += overlap[(from + 1) * count + from] ?? 0;
	}
	const others = (count * (count - 1)) / 2 - cherries;
	return {
		cherries,
		meanCherries: cherries === 0 ? null : sisterSum / cherries,
		others,
		meanOthers: others === 0 ? null : (sum - sisterSum) / others
	};
}
