import { remark, type Remark, type RemarkLevel } from '#lib/remarks/remark.ts';
import { rootAge } from './nodeAges.ts';
import type { TreesRead } from './readTrees.ts';
import { type NamedTree, type Tree, tipIndices, tipLabels } from './tree.ts';
import { isStar, missingLengths, polytomies, singleChildNodes } from './treeShape.ts';
import { tipSpread, ultrametricRemark } from './ultrametric.ts';

/** Below this there is no second MRCA age to compare with. */
const FEWEST_TIPS = 3;

const LEVELS: readonly RemarkLevel[] = ['information', 'look', 'settle'];

/**
 * Everything noticed about one tree as a tree: missing lengths, spread of the tips, star, polytomies, single children, too
 * few tips. Each code at most once.
 *
 * @param index - of the tree among several, from 0; goes to `where.tree`
 * @throws {InputError} `negative-length` or `non-finite` on such a length, which no reader lets through
 */
export function treeRemarks(tree: Tree, index?: number): Remark[] {
	const say = (level: RemarkLevel, code: string, message: string) =>
		remark(level, code, message, index === undefined ? undefined : { tree: index });
	const remarks: Remark[] = [];
	const tipCount = tipIndices(tree).length;
	if (tipCount < FEWEST_TIPS)
		remarks.push(
			say('settle', 'too-few-tips', `Expected at least ${FEWEST_TIPS} tips; the tree has ${tipCount}. Bring a larger tree.`)
		);
	const missing = missingLengths(tree);
	if (missing > 0) {
		const advice = 'Ages of common ancestors need every length: bring the dated tree.';
		remarks.push(say('settle', 'missing-length', `${counted(missing, 'branch has', 'branches have')} no length. ${advice}`));
	} else remarks.push(...ageRemarks(tree, say, index));
	if (tipCount >= FEWEST_TIPS && isStar(tree)) {
		const message =
			'All pairs of tips have the same common ancestor age (a star): nothing can be regressed on age. Bring a resolved tree.';
		remarks.push(say('settle', 'star-tree', message));
	}
	const manyChildren = polytomies(tree);
	if (manyChildren > 0)
		remarks.push(say('information', 'polytomies', `${counted(manyChildren, 'node has', 'nodes have')} more than two children.`));
	const singles = singleChildNodes(tree);
	if (singles > 0)
		remarks.push(
			say('information', 'single-child', `${counted(singles, 'node has', 'nodes have')} a single child; they change no age.`)
		);
	return remarks;
}

/**
 * Remarks on a whole set: what reading noticed, and each thing noticed about a tree once, with the number of trees it holds
 * for and the words of the tree where it is worst or first. Also says when the trees do not share their tips.
 */
export function treeSetRemarks({ trees, remarks }: Pick<TreesRead, 'trees' | 'remarks'>): Remark[] {
	const said = new Set(remarks.map(({ code }) => code));
	const found = new Map<string, { first: Remark; count: number }>();
	for (const [index, { tree }] of trees.entries()) {
		for (const one of treeRemarks(tree, index)) {
			if (said.has(one.code)) continue;
			const known = found.get(one.code);
			if (known === undefined) found.set(one.code, { first: one, count: 1 });
			else known.count += 1;
		}
	}
	const ofTrees = [...found.values()]
		.filter(({ first, count }) => first.code !== 'ultrametric' || count === trees.length)
		.map(({ first, count }) => (trees.length === 1 ? first : ofSeveral(first, count, trees)));
	return [...remarks, ...ofTrees, ...tipSetRemarks(trees)].sort((a, b) => LEVELS.indexOf(b.level) - LEVELS.indexOf(a.level));
}

function ageRemarks(tree: Tree, say: (level: RemarkLevel, code: string, message: string) => Remark, index?: number): Remark[] {
	if (rootAge(tree) === 0)
		return [say('settle', 'no-age', 'Every branch has length 0, so no ancestor has an age. Bring the dated tree.')];
	const { spread, ...ends } = tipSpread(tree);
	return [ultrametricRemark(spread, index === undefined ? ends : { ...ends, tree: index })];
}

function ofSeveral(first: Remark, count: number, trees: readonly NamedTree[]): Remark {
	if (first.code === 'ultrametric') return remark(first.level, first.code, 'In every tree all tips end at the same time.');
	const index = first.where?.tree ?? 0;
	const name = trees[index]?.name ?? '';
	const which = name === '' ? `tree ${index + 1}` : `tree ${index + 1} ("${name}")`;
	const message = `In ${count.toLocaleString('en')} of ${trees.length.toLocaleString('en')} trees, the first being ${which}: ${first.message}`;
	return remark(first.level, first.code, message, first.where);
}

function tipSetRemarks(trees: readonly NamedTree[]): Remark[] {
	const [first, ...others] = trees;
	if (first === undefined) return [];
	const expected = new Set(tipLabels(first.tree));
	const differing = others.map(({ tree }) => tipDifference(expected, tipLabels(tree)));
	const index = differing.findIndex((difference) => difference !== '');
	if (index === -1) return [];
	const count = differing.filter((difference) => difference !== '').length;
	const message =
		`Expected the same tips in every tree; ${counted(count, 'tree differs', 'trees differ')} from the first. ` +
		`Tree ${index + 2} ${differing[index]}. Only species of every tree can be tested.`;
	return [remark('look', 'tips-differ', message, { tree: index + 1 })];
}

function tipDifference(expected: ReadonlySet<string>, labels: readonly string[]): string {
	const added = labels.find((label) => !expected.has(label));
	if (added !== undefined) return `has "${added}", which the first has not`;
	if (labels.length === expected.size) return '';
	const present = new Set(labels);
	return `lacks "${[...expected].find((label) => !present.has(label))}"`;
}

function counted(count: number, one: string, many: string): string {
	return `${count.toLocaleString('en')} ${count === 1 ? one : many}`;
}
