import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { CladeRow } from '#lib/contracts/resultBlocks.ts';
import { spanNames } from '#lib/phylogeny/spanName.ts';
import { treeShape } from '#lib/statistics/agedTree.ts';
import { type TestedClade, testClades } from '#lib/statistics/clades/testClades.ts';
import { cladeGroups } from '../cladeGroups.ts';
import type { PreparedAnalysis } from '../prepareAnalysis.ts';
import { BELOW_THE_ROOT, groupName, NO_CLADE, whyNotBeyond, whyNotTestable } from '../words/cladeWords.ts';
import type { BlockContext } from './blockContext.ts';

type Rows = { readonly names: readonly string[]; readonly declared: boolean; readonly alpha: number; readonly clades: number };

/** Which clades are more alike inside than with the others, and which of them beyond the clade above. */
export function cladesBlock({ plan, prepared }: BlockContext): Pick<AnalysisResult, 'clades' | 'cladeTest'> {
	if (plan.clades === null) return {};
	const { tree, ages, response } = prepared;
	const groups = cladeGroups(prepared, plan);
	const { seed, permutations, alpha } = plan;
	const test = testClades({ tree: { parent: tree.parent, ages }, overlap: response, groups, seed, permutations, alpha });
	const declared = plan.clades.declared !== undefined;
	const rows = { names: spanNames(tree), declared, alpha, clades: groups.length };
	return {
		clades: test.clades.map((clade) => cladeRow(clade, prepared, rows)),
		cladeTest: { exact: test.exact, count: test.count, minTips: declared ? null : plan.clades.minTips }
	};
}

function cladeRow(tested: TestedClade, prepared: PreparedAnalysis, rows: Rows): CladeRow {
	const { group, contrast, p, pAdjusted, smallestP, smallestAdjustedP, holds } = tested;
	const { species, ages } = prepared;
	const members = [...group.members];
	const testable = smallestAdjustedP <= rows.alpha;
	const ways = { tips: members.length, among: species.length, smallestP, smallestAdjustedP, clades: rows.clades };
	return {
		node: group.node,
		label: group.node === null ? groupName(members.map((position) => species[position] ?? '')) : (rows.names[group.node] ?? ''),
		age: group.node === null ? null : (ages[group.node] ?? null),
		tips: members.length,
		members,
		declared: rows.declared,
		...finiteContrast(contrast),
		p,
		pAdjusted,
		...beyondRow(tested, prepared, rows),
		smallestP,
		testable,
		...(testable ? {} : { whyNotTestable: whyNotTestable(ways) }),
		holds
	};
}

type BeyondFields = Pick<CladeRow, 'pBeyondParent' | 'pBeyondParentAdjusted' | 'whyNotBeyond' | 'parent'>;

function beyondRow({ beyond, group }: TestedClade, { tree, ages }: PreparedAnalysis, { names, alpha }: Rows): BeyondFields {
	if (beyond === null) return { pBeyondParent: null, pBeyondParentAdjusted: null, whyNotBeyond: NO_CLADE, parent: null };
	const { parent, parentTips, pAdjusted, smallestP } = beyond;
	const isBelowRoot = treeShape({ parent: tree.parent, ages }).internal[0] === parent;
	const tooFew = whyNotBeyond({ tips: group.members.length, among: parentTips, smallestP, alpha });
	const why = isBelowRoot ? BELOW_THE_ROOT : pAdjusted === null ? tooFew : null;
	return {
		pBeyondParent: isBelowRoot ? null : beyond.p,
		pBeyondParentAdjusted: pAdjusted,
		...(why === null ? {} : { whyNotBeyond: why }),
		parent: { node: parent, label: names[parent] ?? '', tips: parentTips }
	};
}

function finiteContrast({ meanWithin, meanBetween, difference }: TestedClade['contrast']) {
	if (meanWithin === null || meanBetween === null || difference === null)
		throw new Error('A tested group has pairs of both kinds.');
	return { meanWithin, meanBetween, difference };
}
