import { innerNodes, split, type Clade } from './clade.ts';
import type { RandomNumbers } from './randomNumbers.ts';

export type DatingPlan = {
	readonly count: number;
	/** standard deviation of the logarithm of the whole tree's stretch; 0.0554 puts 95 % of roots within 16.5–20.5 for 18.4 Ma */
	readonly rootLogSd: number;
	/** standard deviation of the logarithm of each node's own stretch */
	readonly nodeLogSd: number;
	/** share of trees in which one short branch is resolved differently */
	readonly rearrangedShare: number;
	/** a branch is short when it spans less than this, in Myr */
	readonly shortBranchMyr: number;
};

const MOST_TRIES = 1000;
const AGE_DECIMALS = 5;
const NEAREST_TO_PARENT = 0.995; // where a node is put when its parent leaves it no room

/** Trees around a summary tree: the whole stretched, each node moved on its own below its parent, a few branches swapped. */
export function uncertainTrees(summary: Clade, plan: DatingPlan, random: RandomNumbers): Clade[] {
	return Array.from({ length: plan.count }, () => {
		const shape = random.uniform() < plan.rearrangedShare ? rearranged(summary, plan.shortBranchMyr, random) : summary;
		const stretch = Math.exp(plan.rootLogSd * random.normal());
		const root = roundAge(summary.ageMa * stretch);
		return split(
			root,
			shape.daughters.map((side) => redated(side, root, { stretch, nodeLogSd: plan.nodeLogSd, random }))
		);
	});
}

type Redating = { readonly stretch: number; readonly nodeLogSd: number; readonly random: RandomNumbers };

function redated(clade: Clade, parentAgeMa: number, redating: Redating): Clade {
	if (clade.daughters.length === 0) return clade;
	const ageMa = ageBelow(clade.ageMa * redating.stretch, parentAgeMa, redating);
	return split(
		ageMa,
		clade.daughters.map((daughter) => redated(daughter, ageMa, redating))
	);
}

/** Log-normal around `medianMa`, cut off at the parent's age by drawing again. */
function ageBelow(medianMa: number, parentAgeMa: number, { nodeLogSd, random }: Redating): number {
	for (let attempt = 0; attempt < MOST_TRIES; attempt++) {
		const drawn = roundAge(medianMa * Math.exp(nodeLogSd * random.normal()));
		if (drawn < parentAgeMa && drawn > 0) return drawn;
	}
	return roundAge(parentAgeMa * NEAREST_TO_PARENT);
}

/** One short inner branch, at random, resolved differently; the tree as it is when none is short enough. */
function rearranged(clade: Clade, shortBranchMyr: number, random: RandomNumbers): Clade {
	const swappable = innerNodes(clade).filter((node) => swappedBelow(node, shortBranchMyr) !== node);
	const chosen = swappable[random.index(swappable.length)];
	const rebuild = (part: Clade): Clade =>
		part === chosen ? swappedBelow(part, shortBranchMyr) : { ...part, daughters: part.daughters.map(rebuild) };
	return rebuild(clade);
}

/** ((A,B),C) becomes ((A,C),B): allowed when the branch above (A,B) is short and C is younger than the node it moves under. */
function swappedBelow(node: Clade, shortBranchMyr: number): Clade {
	const [left, right] = node.daughters;
	if (left === undefined || right === undefined) return node;
	for (const [inner, other] of [[left, right] as const, [right, left] as const]) {
		const [stays, leaves] = inner.daughters;
		const isShort = node.ageMa - inner.ageMa < shortBranchMyr;
		if (stays === undefined || leaves === undefined || !isShort || other.ageMa >= inner.ageMa) continue;
		return split(node.ageMa, [split(inner.ageMa, [stays, other]), leaves]);
	}
	return node;
}

function roundAge(ageMa: number): number {
	return Number(ageMa.toFixed(AGE_DECIMALS));
}
