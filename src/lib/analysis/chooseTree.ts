import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { readTrees } from '#lib/phylogeny/readTrees.ts';
import { treeRemarks } from '#lib/phylogeny/treeRemarks.ts';
import { levelTips } from '#lib/phylogeny/ultrametric.ts';
import type { Tree } from '#lib/phylogeny/tree.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import { AnalysisRefusal } from './refusal.ts';

export type ChosenTree = {
	readonly tree: Tree;
	readonly index: number;
	readonly name: string;
	readonly treesInSet: number;
	readonly remarks: readonly Remark[];
	readonly levelled: boolean;
};

/** A remark that a person's confirmation of the spread settles. */
const SETTLED_BY_SPREAD = 'spread-needs-decision';

/**
 * One tree of a text, levelled when the person confirmed its spread.
 * @throws {InputError} as the reader; `no-such-tree` when the index is past the last tree
 */
export function readOneTree(text: string, index: number, spreadConfirmed: boolean): ChosenTree {
	const { trees } = readTrees(text);
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
		remarks: levelled ? remarks.filter(({ code }) => code !== SETTLED_BY_SPREAD) : remarks
	};
}

/**
 * The tree a plan asks for, ready to be dated.
 * @throws {AnalysisRefusal} `choose-a-tree` for all trees of a set; `must-be-settled` while a remark on the tree is open
 */
export function chooseTree(inputs: AnalysisInputs, plan: Plan): ChosenTree {
	const chosen = readOneTree(inputs.treeText, plan.tree === 'all' ? 0 : plan.tree, inputs.spreadConfirmed);
	if (plan.tree === 'all' && chosen.treesInSet > 1) {
		throw new AnalysisRefusal(
			'choose-a-tree',
			`The tree set holds ${chosen.treesInSet} trees. Choose one by its index, 0 to ${chosen.treesInSet - 1}; a test over all of them is not available yet.`
		);
	}
	const open = chosen.remarks.filter(({ level }) => level === 'settle');
	const [first] = open;
	if (first !== undefined) throw new AnalysisRefusal(first.code, first.message, open);
	return chosen;
}
