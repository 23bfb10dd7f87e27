import { type AgedTree, treeShape } from '../agedTree.ts';
import { pairBlocks } from '../pairBlocks.ts';
import { randomStream } from '../randomStream.ts';
import { fallCurve } from './fitFall.ts';
import { type FallMeasure, tabulatedOverlap } from './gaussianOverlap.ts';
import { nodeAgesOf, nodeMeans } from './nodeMeans.ts';
import type { Axes } from './randomWalkFall.ts';
import { centreDistance, centreWalker } from './walkedNiches.ts';
import { youngResidual, youngSlots } from './youngPairs.ts';

/** Overlaps of one clade, as a random walk would see them. */
export type WalkedFall = {
	/** of the fitted curve; per unit of age */
	readonly k: number;
	/** mean residual of the young pairs */
	readonly young: number;
};

export type FallReader = {
	/** @param means - of the pairs that meet at each node, shape (slots,) */
	readonly read: (means: Float64Array) => WalkedFall;
	/** random walks at a true k, read like the data; equal seed, domain and chunk give equal bits */
	readonly walk: (k: number, count: number, stream: Seeding) => WalkedFall[];
};

export type Seeding = { readonly seed: number; readonly domain: number; readonly chunk: number };

/**
 * Reads overlaps on one tree against the curve of a random walk, and simulates such walks to read them alike: centres by
 * Brownian motion on so many axes, niches of one width, overlaps by their closed form, the curve fitted anew each time.
 *
 * Cost: each pair once per walk.
 */
export function fallReader(measure: FallMeasure, axes: Axes, tree: AgedTree): FallReader {
	const shape = treeShape(tree);
	const layout = pairBlocks(shape);
	const nodes = nodeAgesOf(tree, shape, layout);
	const curve = fallCurve(measure, axes, nodes);
	const young = youngSlots(nodes.ages);
	const walkCentres = centreWalker(tree, shape);
	const overlapAt = tabulatedOverlap(measure);

	const read = (means: Float64Array): WalkedFall => {
		const { k } = curve.fit(means);
		return { k, young: youngResidual(young, { means, curve: curve.at(k), pairs: nodes.pairs }) };
	};
	const walk: FallReader['walk'] = (k, count, { seed, domain, chunk }) => {
		const stream = randomStream(seed, chunk, domain);
		return Array.from({ length: count }, () => {
			const centres = walkCentres({ axes, rate: 2 * k }, stream);
			return read(nodeMeans(layout, (row, column) => overlapAt(centreDistance(centres, row, column))));
		});
	};
	return { read, walk };
}
