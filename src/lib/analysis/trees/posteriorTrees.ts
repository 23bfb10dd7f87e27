import { nodeAges } from '#lib/phylogeny/nodeAges.ts';
import { pruneTree } from '#lib/phylogeny/pruneTree.ts';
import type { Tree } from '#lib/phylogeny/tree.ts';
import { singleChildNodes } from '#lib/phylogeny/treeShape.ts';
import type { PosteriorTree } from '#lib/statistics/posterior/posteriorTree.ts';
import { AnalysisRefusal } from '../refusal.ts';
import { type DatedTree, treeCalled } from './usedTrees.ts';

/**
 * Every tree pruned to the species that are tested, its tips matched to their rows. Names are matched once: all trees of a
 * text share them.
 *
 * @param species - tip labels in the order of the rows
 * @throws {AnalysisRefusal} `tips-differ` when a tree lacks one of the species
 */
export function* posteriorTrees(trees: readonly DatedTree[], species: readonly string[]): Generator<PosteriorTree> {
	const rowOf = new Map(species.map((name, row) => [name, row]));
	for (const dated of trees) {
		const kept = keptTips(dated.tree, rowOf);
		if (kept.length !== species.length) refuseMissing(dated, species);
		yield matched(dated.tree, kept, rowOf);
	}
}

/** Tips that some trees hold and the tree that is drawn does not, in the order met. */
export function extraTips(trees: readonly DatedTree[], displayed: ReadonlySet<string>): string[] {
	const extra = new Set<string>();
	for (const { tree } of trees) {
		for (let node = 0; node < tree.parent.length; node++) {
			const label = tree.label[node] ?? '';
			if (tree.childCount[node] === 0 && !displayed.has(label)) extra.add(label);
		}
	}
	return [...extra];
}

function keptTips({ childCount, label }: Tree, rowOf: ReadonlyMap<string, number>): number[] {
	const kept: number[] = [];
	for (let node = 0; node < childCount.length; node++) {
		if (childCount[node] === 0 && rowOf.has(label[node] ?? '')) kept.push(node);
	}
	return kept;
}

function matched(whole: Tree, kept: readonly number[], rowOf: ReadonlyMap<string, number>): PosteriorTree {
	const isWhole = singleChildNodes(whole) === 0 && whole.parent.length === nodesWith(kept.length, whole);
	const tree = isWhole ? whole : pruneTree(whole, kept);
	const rows = new Int32Array(kept.length);
	for (let node = 0, tip = 0; node < tree.parent.length; node++) {
		if (tree.childCount[node] === 0) rows[tip++] = rowOf.get(tree.label[node] ?? '') ?? -1;
	}
	return { parent: tree.parent, ages: nodeAges(tree), rows };
}

/** Nodes of a tree all of whose tips are kept: the kept ones and its inner nodes. */
function nodesWith(keptCount: number, { childCount }: Tree): number {
	let inner = 0;
	for (let node = 0; node < childCount.length; node++) if ((childCount[node] ?? 0) > 0) inner++;
	return keptCount + inner;
}

function refuseMissing(dated: DatedTree, species: readonly string[]): never {
	const held = new Set(dated.tree.label);
	const missing = species.filter((name) => !held.has(name));
	const more = missing.length > 1 ? ` and ${missing.length - 1} more` : '';
	throw new AnalysisRefusal(
		'tips-differ',
		`Expected every tree of the set to hold the species that are tested; ${treeCalled(dated)} lacks “${missing[0] ?? ''}”${more}. ` +
			'Name the species of the plan without it, choose one tree, or bring trees of the same tips.'
	);
}
