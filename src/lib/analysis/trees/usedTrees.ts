import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import type { NamedTree, Tree } from '#lib/phylogeny/tree.ts';
import { treeRemarks } from '#lib/phylogeny/treeRemarks.ts';
import { missingLengths } from '#lib/phylogeny/treeShape.ts';
import { levelTips, ROUNDING_SPREAD, ultrametricSpread } from '#lib/phylogeny/ultrametric.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import { AnalysisRefusal } from '../refusal.ts';

/** Trees of a text that are used: after burn-in, every so many. */
export type UsedTrees = {
	readonly trees: readonly DatedTree[];
	readonly inText: number;
	readonly burnIn: number;
	readonly thin: number;
	/** place in `trees` of the one that is drawn */
	readonly displayed: number;
};

/** A tree whose tips all live now, levelled where a person confirmed it. */
export type DatedTree = { readonly tree: Tree; readonly name: string; readonly index: number; readonly levelled: boolean };

const SETTLED_BY_SPREAD = 'spread-needs-decision';

/**
 * The trees that a test over all of them uses. The summary tree is drawn: the one that the text marks as its default, else
 * the first that is used.
 *
 * @throws {AnalysisRefusal} `burn-in-too-long` when none is left; an open remark's code, with the first tree that has it and
 *   the number of trees that do
 */
export function usedTrees(
	all: readonly NamedTree[],
	{ chosen, spreadConfirmed }: Pick<AnalysisInputs, 'chosen' | 'spreadConfirmed'>
): UsedTrees {
	const { burnIn, thin } = chosen ?? { burnIn: 0, thin: 1 };
	const used = [...all.keys()].filter((index) => index >= burnIn && (index - burnIn) % thin === 0);
	if (used.length === 0) {
		throw new AnalysisRefusal(
			'burn-in-too-long',
			`Expected the burn-in to leave at least one tree; the text holds ${all.length} and ${burnIn} are left out. Give a smaller number.`
		);
	}
	const open: Remark[] = [];
	const trees = used.flatMap((index): DatedTree[] => {
		const named = all[index];
		if (named === undefined) return [];
		const dated = datedTree(named, index, spreadConfirmed);
		if ('remark' in dated) open.push(dated.remark);
		return 'remark' in dated ? [] : [dated];
	});
	refuseOpen(open, { all, used: used.length });
	const isDefault = trees.findIndex(({ index }) => all[index]?.isDefault === true);
	return { trees, inText: all.length, burnIn, thin, displayed: Math.max(0, isDefault) };
}

/** How a tree is called in a message: its number in the text, counted from 1, and its name. */
export function treeCalled({ index, name }: Pick<DatedTree, 'index' | 'name'>): string {
	return name === '' ? `tree ${index + 1}` : `tree ${index + 1} (“${name}”)`;
}

function datedTree({ tree, name }: NamedTree, index: number, spreadConfirmed: boolean): DatedTree | { readonly remark: Remark } {
	if (missingLengths(tree) === 0 && ultrametricSpread(tree) <= ROUNDING_SPREAD) return { tree, name, index, levelled: false };
	const open = treeRemarks(tree, index).filter(({ level }) => level === 'settle');
	const first = open.find(({ code }) => !(spreadConfirmed && code === SETTLED_BY_SPREAD));
	return first === undefined ? { tree: levelTips(tree), name, index, levelled: true } : { remark: first };
}

function refuseOpen(open: readonly Remark[], { all, used }: { all: readonly NamedTree[]; used: number }): void {
	const [first] = open;
	if (first === undefined) return;
	const index = first.where?.tree ?? 0;
	const called = treeCalled({ index, name: all[index]?.name ?? '' });
	const which =
		open.length === 1 ? `In ${called}` : `In ${open.length} of the ${used} trees that are used, the first being ${called}`;
	throw new AnalysisRefusal(first.code, `${which}: ${first.message}`, [first]);
}
