import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { readTrees } from '#lib/phylogeny/readTrees.ts';
import { treeRemarks } from '#lib/phylogeny/treeRemarks.ts';
import { levelTips } from '#lib/phylogeny/ultrametric.ts';
import type { NamedTree, Tree } from '#lib/phylogeny/tree.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import { AnalysisRefusal } from './refusal.ts';
import { setRemarks } from './trees/setRemarks.ts';
import { type UsedTrees, usedTrees } from './trees/usedTrees.ts';

export type ChosenTree = {
	readonly tree: Tree;
	readonly index: number;
	readonly name: string;
	readonly treesInSet: number;
	readonly remarks: readonly Remark[];
	readonly levelled: boolean;
	/** the trees that are averaged over; null for a test on one tree */
	readonly used: UsedTrees | null;
};

/** A remark that a person's confirmation of the spread settles. */
const SETTLED_BY_SPREAD = 'spread-needs-decision';

/**
 * One tree of a text, levelled when the person confirmed its spread.
 * @throws {InputError} as the reader; `no-such-tree` when the index is past the last tree
 */
export function readOneTree(text: string, index: number, spreadConfirmed: boolean): ChosenTree {
	return oneTree(readTrees(text).trees, index, spreadConfirmed);
}

function oneTree(trees: readonly NamedTree[], index: number, spreadConfirmed: boolean): ChosenTree {
	const chosen = trees[index];
	if (chosen === undefined) {
		throw new AnalysisRefusal(
			'no-such-tree',
			`The tree set holds ${trees.length} tree${trees.length === 1 ? '' : 's'}, counted from 0; there is no tree ${index}.`
		);
	}
	const remarks = treeRemarks(chosen.tree, index);
	const levelled = spreadConfirmed && remarks.some(({ code }) => code === SETTLED_BY_SPREAD);
	return {
		tree: levelled ? levelTips(chosen.tree) : chosen.tree,
		index,
		name: chosen.name,
		treesInSet: trees.length,
		levelled,
		used: null,
		remarks: levelled ? remarks.filter(({ code }) => code !== SETTLED_BY_SPREAD) : remarks
	};
}

/**
 * The tree a plan asks for, ready to be dated; for a plan on all trees of a set, the one that is drawn, with the others beside it.
 * @throws {AnalysisRefusal} the code of a remark on the tree that is open; as `usedTrees`
 */
export function chooseTree(inputs: AnalysisInputs, plan: Plan): ChosenTree {
	const { trees } = readTrees(inputs.treeText);
	const used = plan.tree === 'all' ? usedTrees(trees, inputs) : null;
	const displayed = used?.trees[used.displayed];
	const index = displayed?.index ?? (plan.tree === 'all' ? 0 : plan.tree);
	const chosen = oneTree(trees, index, inputs.spreadConfirmed);
	const open = chosen.remarks.filter(({ level }) => level === 'settle');
	const [first] = open;
	if (first !== undefined) throw new AnalysisRefusal(first.code, first.message, open);
	if (used === null || used.trees.length === 1) return chosen;
	return { ...chosen, treesInSet: used.trees.length, remarks: [...chosen.remarks, ...setRemarks(used)], used };
}
