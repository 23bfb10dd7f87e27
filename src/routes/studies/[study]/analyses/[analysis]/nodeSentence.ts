import { formatCount, formatP, formatSlope } from '#lib/analysis/words/numbers.ts';
import { unitWords } from '#lib/analysis/words/units.ts';
import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { Alternative } from '#lib/contracts/plan.ts';

type NodeTest = AnalysisResult['nodeAverages']['plain'];
type Told = Pick<AnalysisResult, 'compared' | 'permutation'> & {
	readonly nodeAverages: { readonly nodes: readonly unknown[]; readonly nested: NodeTest; readonly plain: NodeTest };
	readonly plate: Pick<AnalysisResult['plate'], 'nodeSlopeHistogram'>;
};

/** What the node means say, the weighting that was drawn first; null where their slopes were not kept. */
export function nodeSentence(told: Told): string | null {
	if (told.plate.nodeSlopeHistogram === null) return null;
	const { nodes, plain, nested } = told.nodeAverages;
	const per = unitWords(told.compared.ageUnit).per;
	return (
		`One mean for each of ${formatCount(nodes.length)} nodes, every pair across it equal: the slope of these means is ` +
		`${formatSlope(plain.slope)} ${per}, p ${nodeP(plain, told)}. ` +
		`Weighted by branching it is ${formatSlope(nested.slope)}, p ${nodeP(nested, told)}.`
	);
}

/** p of a node slope in the tail that the plan asked about, with its sign. */
export function nodeP(test: NodeTest, { compared, permutation }: Pick<Told, 'compared' | 'permutation'>): string {
	const sides = compared.alternative === 'two-sided' ? 2 : 1;
	return formatP(tailOf(test, compared.alternative), permutation.exact ? null : sides / (permutation.count + 1));
}

function tailOf({ pLess, pGreater, pTwoSided }: NodeTest, alternative: Alternative): number {
	return { less: pLess, greater: pGreater, 'two-sided': pTwoSided }[alternative];
}
