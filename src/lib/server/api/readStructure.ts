import type { TreeStructure } from '#lib/contracts/compute.ts';
import { compute } from '#lib/server/jobs/pool.ts';
import * as texts from '#lib/server/repositories/texts.ts';
import { treeInText, type TreeSet } from '#lib/server/repositories/treeSetRows.ts';
import { noSuchTree } from './startAnalysis.ts';

/**
 * One tree of a set with the ages of its nodes.
 * @param tree - counted among the trees that the set uses, from 0
 * @throws {Refusal} 422 `no-such-tree`
 * @throws {InputError} when the tree cannot be dated, such as `missing-length`
 */
export async function readStructure(treeSet: TreeSet, tree: number): Promise<TreeStructure> {
	const { text, index } = await readTree(treeSet, tree);
	return compute('treeStructure', { text, tree: index, spreadConfirmed: treeSet.spreadConfirmed });
}

export async function readTree({ textHash, chosen, treeCount }: TreeSet, tree: number): Promise<{ text: string; index: number }> {
	if (tree >= treeCount) throw noSuchTree(tree, treeCount);
	return { text: await texts.load(textHash), index: treeInText(chosen, tree) };
}
