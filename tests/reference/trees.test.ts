import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { mrcaAges } from '#lib/phylogeny/mrcaAges.ts';
import { nodeAges, nodeDepths } from '#lib/phylogeny/nodeAges.ts';
import { pruneTree } from '#lib/phylogeny/pruneTree.ts';
import { readTrees } from '#lib/phylogeny/readTrees.ts';
import { polytomies } from '#lib/phylogeny/treeShape.ts';
import { type Tree, tipIndices, tipLabels } from '#lib/phylogeny/tree.ts';
import { ultrametricSpread } from '#lib/phylogeny/ultrametric.ts';
import { InputError } from '#lib/remarks/inputError.ts';

// Every expected number is from fixtures/reference/trees.json: computed in R 4.2 with ape 5.7, independently of this program.
type NodeCase = {
	tips: string[];
	n_children: number;
	label: string | null;
	dist_from_root: number;
	age_from_tallest_tip: number;
};
type TreeCase = {
	name: string;
	newick: string;
	tips: string[];
	n_internal: number;
	n_polytomies_incl_root: number;
	total_branch_length: number;
	root_to_tip: number[];
	tree_height: number;
	ultrametric_spread_rel: number;
	nodes: NodeCase[];
	mrca_age_lower_from_tallest_tip?: number | number[];
};
type PruneCase = Pick<TreeCase, 'newick' | 'tips' | 'nodes' | 'tree_height' | 'total_branch_length'> & {
	from: string;
	dropped: string | string[];
	patristic_lower: number[];
};
type SyntaxCase = { text: string; format: string; n_trees: number; tips: string[]; root_to_tip: number[] | null };
type Reference = {
	trees: TreeCase[];
	pruning: PruneCase[];
	syntax: SyntaxCase[];
	malformed: { text: string; expected: string }[];
};

const reference: Reference = JSON.parse(readFileSync(new URL('../../fixtures/reference/trees.json', import.meta.url), 'utf8'));

/** Unit of the branch lengths, trees up to 473 high: the sums run in another order than the reference's. */
const SUMMING = 1e-10;
/** The reference pruned trees whose lengths have more digits than the ten of the text it gives here. */
const PRINTING = 1e-9;
const blanked = (labels: readonly string[]) => labels.map((label) => label.replaceAll('_', ' '));

function only(text: string): Tree {
	const { trees } = readTrees(text);
	if (trees.length !== 1 || trees[0] === undefined) throw new Error('the case holds one tree');
	return trees[0].tree;
}

/** Every inner node under its sorted tips, with children, depth and age. */
function nodesByTips(tree: Tree): Map<string, { children: number; depth: number; age: number; label: string }> {
	const ages = nodeAges(tree);
	const depths = nodeDepths(tree);
	const below: string[][] = tree.label.map((label, node) => (tree.childCount[node] === 0 ? [label] : []));
	for (let node = tree.parent.length - 1; node > 0; node--) below[tree.parent[node] ?? 0]?.push(...(below[node] ?? []));
	const inner = [...tree.parent.keys()].filter((node) => (tree.childCount[node] ?? 0) > 0);
	return new Map(
		inner.map((node) => [
			(below[node] ?? []).sort().join('|'),
			{ children: tree.childCount[node] ?? 0, depth: depths[node] ?? NaN, age: ages[node] ?? NaN, label: tree.label[node] ?? '' }
		])
	);
}

function expectNodes(tree: Tree, expected: NodeCase[], tolerance: number): void {
	const nodes = nodesByTips(tree);
	expect(nodes.size).toBe(expected.length);
	for (const node of expected) {
		const found = nodes.get(blanked(node.tips).sort().join('|'));
		expect(found).toMatchObject({ children: node.n_children, label: node.label ?? '' });
		expect(Math.abs((found?.depth ?? NaN) - node.dist_from_root)).toBeLessThan(tolerance);
		expect(Math.abs((found?.age ?? NaN) - node.age_from_tallest_tip)).toBeLessThan(tolerance);
	}
}

/** Column-major strict lower triangle of a symmetric matrix. */
function lowerTriangle(matrix: Float64Array, count: number): number[] {
	const values: number[] = [];
	for (let column = 0; column < count; column++)
		for (let row = column + 1; row < count; row++) values.push(matrix[row * count + column] ?? NaN);
	return values;
}

function expectClose(found: readonly number[], expected: readonly number[], tolerance = SUMMING): void {
	expect(found.length).toBe(expected.length);
	for (const [i, value] of expected.entries()) expect(Math.abs((found[i] ?? NaN) - value)).toBeLessThan(tolerance);
}

const totalLength = (tree: Tree) => tree.length.reduce((sum, length) => sum + length, 0);

describe('reference trees', () => {
	it.each(reference.trees)('reads $name as the reference does, tip by tip and node by node', (expected) => {
		const tree = only(expected.newick);
		expect(tipLabels(tree)).toEqual(blanked(expected.tips));
		expect(polytomies(tree)).toBe(expected.n_polytomies_incl_root);
		expectClose([totalLength(tree)], [expected.total_branch_length]);
		const depths = nodeDepths(tree);
		expectClose(
			tipIndices(tree).map((tip) => depths[tip] ?? NaN),
			[expected.root_to_tip].flat()
		);
		expectClose([ultrametricSpread(tree)], [expected.ultrametric_spread_rel]);
		expectNodes(tree, expected.nodes, SUMMING);
	});

	it.each(reference.trees.filter((one) => one.mrca_age_lower_from_tallest_tip !== undefined))(
		'gives the MRCA ages of $name',
		(expected) => {
			const tree = only(expected.newick);
			const ages = mrcaAges(tree, nodeAges(tree));
			expectClose(lowerTriangle(ages, expected.tips.length), [expected.mrca_age_lower_from_tallest_tip ?? []].flat());
		}
	);

	it.each(reference.pruning)('prunes $from to the reference tree', (expected) => {
		const whole = only(reference.trees.find(({ name }) => name === expected.from)?.newick ?? '');
		const dropped = new Set([expected.dropped].flat());
		const pruned = pruneTree(
			whole,
			tipIndices(whole).filter((tip) => !dropped.has(whole.label[tip] ?? ''))
		);
		expect(tipLabels(pruned)).toEqual(expected.tips);
		expectNodes(pruned, expected.nodes, PRINTING);
		expectClose([totalLength(pruned)], [expected.total_branch_length], PRINTING);
		// In these ultrametric trees the MRCA age is half the patristic distance.
		const halves = expected.patristic_lower.map((distance) => distance / 2);
		expectClose(lowerTriangle(mrcaAges(pruned, nodeAges(pruned)), expected.tips.length), halves, PRINTING);
	});
});

describe('reference texts', () => {
	it.each(reference.syntax)('reads $text', (expected) => {
		const read = readTrees(expected.text);
		const tree = read.trees[0]?.tree;
		if (tree === undefined) throw new Error('the case holds a tree');
		expect(read.format).toBe(expected.format);
		expect(read.trees.length).toBe(expected.n_trees);
		expect(tipLabels(tree)).toEqual(blanked(expected.tips));
		if (expected.root_to_tip === null) return;
		const depths = nodeDepths(tree);
		expectClose(
			tipIndices(tree).map((tip) => depths[tip] ?? NaN),
			expected.root_to_tip
		);
	});

	// Which of ours answers each text; the reference tells only what a person must be told.
	const codes: Record<string, string> = {
		'((A:1,B:1):1,C:2;': 'unbalanced-brackets',
		'(A:1,B:1)):1;': 'unbalanced-brackets',
		'(A:1,B:x);': 'bad-length',
		'': 'empty-text',
		'A,B,C;': 'not-a-tree',
		'(A:1,A:1);': 'duplicate-tip',
		'(A:1,:1);': 'unnamed-tip',
		'(A:1,B:-1);': 'negative-length',
		'#NEXUS\nbegin trees;\ntranslate 1 A, 2 B;\ntree t=(1:1,3:1);\nend;\n': 'not-in-translate',
		'#NEXUS\nbegin data;\nend;\n': 'no-trees-block',
		"('A:1,B:1);": 'unbalanced-quote',
		'(A[:1,B:1);': 'unbalanced-comment',
		'(A:1,,B:1);': 'unnamed-tip'
	};
	const accepted = '(A:1,B:1)';

	it.each(reference.malformed.filter(({ text }) => text !== accepted))('refuses $text: $expected', ({ text }) => {
		let error: unknown;
		try {
			readTrees(text);
		} catch (caught) {
			error = caught;
		}
		expect(error).toBeInstanceOf(InputError);
		expect(error).toMatchObject({
			code: codes[text] ?? 'a code for every text',
			where: { line: expect.any(Number), column: expect.any(Number) }
		});
	});

	it('accepts a tree without its semicolon and says so', () => {
		expect(readTrees(accepted).remarks).toMatchObject([{ level: 'look', code: 'missing-semicolon' }]);
	});
});
