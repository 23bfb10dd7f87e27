import type { TreeShape } from '../agedTree.ts';
import { type Family, stepDownFamilies } from '../multiplicity/stepDownFamilies.ts';
import { minimumP, type SharedNull } from '../multiplicity/minimumP.ts';
import { STREAM_DOMAIN } from '../randomStream.ts';
import type { SpeciesGroup } from './cladeList.ts';
import { contrastNulls } from './contrastNulls.ts';
import { directWithinSums } from './directSums.ts';
import { smallestMembershipP } from './memberships.ts';

/** What a clade shows beyond the clade that contains it. */
export type BeyondParent = {
	readonly node: number;
	/** the clade that contains it */
	readonly parent: number;
	readonly parentTips: number;
	/** mean within, less the mean with the rest of the parent */
	readonly difference: number;
	readonly p: number;
	/** adjusted for every clade asked about; null where the sizes let no p of its parent reach the level */
	readonly pAdjusted: number | null;
	readonly smallestP: number;
};

export type BeyondQuestion = {
	readonly shape: TreeShape;
	/** shape (nodes,) */
	readonly parentOf: Int32Array;
	/** shape (n, n), row-major, tips in tree order */
	readonly overlap: Float64Array;
	/** clades of the tree, each with its node; never the root */
	readonly clades: readonly SpeciesGroup[];
	/** nulls of the same clades when every species may stand anywhere: inside the root that is the question itself */
	readonly free: { readonly nulls: readonly SharedNull[]; readonly exact: boolean };
	readonly seed: number;
	readonly permutations: number;
	readonly alpha: number;
	/** called before every batch of shuffles; it may throw to stop */
	readonly onBatch?: () => void;
};

/**
 * Whether clades are more alike inside than with the rest of the clade that contains them. A clade inside an alike clade
 * is flagged for its parent's sake by any test on the whole tree; here only the parent's own species change places, and
 * only its own pairs speak. Clades with one parent share its shuffles and are adjusted by the minimum p. Parents are
 * adjusted among each other by Šidák's bound, step by step: where species are exchangeable inside a parent, how it splits
 * says nothing about how its parts split in turn, so their p-values behave as independent. That holds whichever of the
 * other clades differ.
 *
 * Cost per shuffle: for every parent, half the square of the smaller side of its split.
 *
 * @returns one entry a clade, in the order given
 */
export function beyondParent(question: BeyondQuestion): BeyondParent[] {
	const { clades, parentOf, alpha } = question;
	const parents = [...new Set(clades.map((clade) => parentOf[nodeOf(clade)] ?? 0))];
	const splits = parents.map((parent) => splitOf(question, parent));
	const { adjusted } = stepDownFamilies(splits, alpha);
	const found = splits.flatMap(({ children }, split) =>
		children.map((child, k) => ({ ...child, pAdjusted: adjusted[split]?.[k] ?? null }))
	);
	return clades.map((clade) => {
		const beyond = found.find(({ node }) => node === clade.node);
		if (beyond === undefined) throw new Error('Every clade has a parent that was asked.');
		return beyond;
	});
}

type Split = Family & { readonly children: readonly Omit<BeyondParent, 'pAdjusted'>[] };

/** One parent's shuffles, and what its children show in them. */
function splitOf(question: BeyondQuestion, parent: number): Split {
	const { clades, parentOf, permutations, shape } = question;
	const indices = [...clades.keys()].filter((index) => parentOf[nodeOf(clades[index])] === parent);
	const children = indices.flatMap((index) => clades[index] ?? []);
	const { nulls, exact } = parent === 0 ? insideRoot(question, indices) : insideOf(question, parent, children);
	const { adjusted } = minimumP(nulls, { tail: 'greater', exact });
	const parentTips = (shape.tipTo[parent] ?? 0) - (shape.tipFrom[parent] ?? 0);
	const fewest = exact ? 0 : 1 / (permutations + 1);
	const described = children.map((clade, k) => ({
		node: nodeOf(clade),
		parent,
		parentTips,
		difference: nulls[k]?.observed ?? Number.NaN,
		p: adjusted[k]?.p ?? 1,
		smallestP: Math.max(fewest, smallestMembershipP(parentTips, clade.members.length))
	}));
	return {
		children: described,
		p: adjusted.map(({ pSingleStep }) => pSingleStep),
		smallestP: Math.min(...described.map(({ smallestP }) => smallestP))
	};
}

function insideRoot({ free }: BeyondQuestion, indices: readonly number[]) {
	return { exact: free.exact, nulls: indices.flatMap((index) => free.nulls[index] ?? []) };
}

/** Only the pairs inside the parent, and only its species changing places. */
function insideOf(question: BeyondQuestion, parent: number, children: readonly SpeciesGroup[]) {
	const { shape, overlap, seed, permutations, onBatch } = question;
	const from = shape.tipFrom[parent] ?? 0;
	const count = (shape.tipTo[parent] ?? 0) - from;
	const groups = children.map(({ node, members }) => ({ node, members: members.map((position) => position - from) }));
	return contrastNulls({
		matrix: inner(overlap, shape.tips.length, { from, count }),
		count,
		groups,
		withinSums: (matrix) => directWithinSums(groups, count, matrix),
		domain: STREAM_DOMAIN.insideClade + parent,
		seed,
		permutations,
		...(onBatch ? { onBatch } : {})
	});
}

/** Rows and columns of neighbouring positions, as a matrix of their own. */
function inner(overlap: Float64Array, size: number, { from, count }: { from: number; count: number }): Float64Array {
	const matrix = new Float64Array(count * count);
	for (let row = 0; row < count; row++) {
		const start = (from + row) * size + from;
		matrix.set(overlap.subarray(start, start + count), row * count);
	}
	return matrix;
}

function nodeOf(clade: SpeciesGroup | undefined): number {
	if (clade?.node === undefined || clade.node === null) throw new Error('Only a clade of the tree has a parent.');
	return clade.node;
}
