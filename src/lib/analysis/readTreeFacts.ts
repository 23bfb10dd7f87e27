import type { TreeFacts, TreeReading, TreeStructure } from '#lib/contracts/compute.ts';
import type { Confirm } from '#lib/contracts/materials.ts';
import { mrcaAges } from '#lib/phylogeny/mrcaAges.ts';
import { nodeAges, rootAge } from '#lib/phylogeny/nodeAges.ts';
import { readTrees } from '#lib/phylogeny/readTrees.ts';
import { tipIndices, tipLabels, type NamedTree } from '#lib/phylogeny/tree.ts';
import { treeRemarks, treeSetRemarks } from '#lib/phylogeny/treeRemarks.ts';
import { missingLengths, polytomies } from '#lib/phylogeny/treeShape.ts';
import { ultrametricSpread } from '#lib/phylogeny/ultrametric.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import { readOneTree } from './chooseTree.ts';

/** What a text of trees holds: facts of every tree and the remarks of the whole set. A confirmed spread closes its remark. */
export function readTreeFacts(text: string, confirm?: Confirm): TreeReading {
	const read = readTrees(text);
	const isOpen = ({ code }: { code: string }) => !(confirm?.spread === true && code === 'spread-needs-decision');
	return {
		format: read.format,
		trees: read.trees.map((named, index) => factsOf(named, index)),
		remarks: treeSetRemarks(read).filter(isOpen)
	};
}

function factsOf({ name, tree }: NamedTree, index: number): TreeFacts {
	const dated = missingLengths(tree) === 0;
	const age = dated ? rootAge(tree) : null;
	return {
		name,
		tips: tipLabels(tree),
		rootAge: age,
		ultrametricSpread: age !== null && age > 0 ? ultrametricSpread(tree) : null,
		polytomies: polytomies(tree),
		remarks: treeRemarks(tree, index)
	};
}

/** One tree as it is drawn and served. Ages are NaN-free: a tree with missing lengths is refused. */
export function treeStructure(text: string, index: number, spreadConfirmed: boolean): TreeStructure {
	const { tree } = readOneTree(text, index, spreadConfirmed);
	const ages = nodeAges(tree);
	const tips = new Array<number>(tree.parent.length).fill(0);
	for (let node = tree.parent.length - 1; node >= 0; node--) {
		if (tree.childCount[node] === 0) tips[node] = 1;
		const above = tree.parent[node] ?? -1;
		if (above >= 0) tips[above] = (tips[above] ?? 0) + (tips[node] ?? 0);
	}
	return { parent: [...tree.parent], age: [...ages], label: [...tree.label], tips, tipNames: tipLabels(tree) };
}

/**
 * MRCA ages of all pairs of tips, or of those named.
 * @throws {InputError} `unknown-species` when a name is not a tip
 */
export function pairAges(
	text: string,
	index: number,
	{ spreadConfirmed, species }: { spreadConfirmed: boolean; species?: readonly string[] }
) {
	const { tree } = readOneTree(text, index, spreadConfirmed);
	const ages = nodeAges(tree);
	const tipOf = new Map(tipIndices(tree).map((node) => [tree.label[node] ?? '', node]));
	const names = species ?? tipLabels(tree);
	const tips = names.map((name) => {
		const tip = tipOf.get(name);
		if (tip === undefined)
			throw new InputError('unknown-species', `Expected "${name}" to be a tip of the tree; it is not there.`, { name });
		return tip;
	});
	return { species: names, values: mrcaAges(tree, ages, tips) };
}
