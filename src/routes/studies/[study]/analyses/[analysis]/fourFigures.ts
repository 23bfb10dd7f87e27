import { formatCount, formatP, formatShare, formatSlope } from '#lib/analysis/words/numbers.ts';
import { unitWords } from '#lib/analysis/words/units.ts';
import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { Alternative } from '#lib/contracts/plan.ts';

export type Figure = { readonly label: string; readonly value: string; readonly note: string };

type Told = Pick<AnalysisResult, 'compared' | 'species' | 'regression' | 'permutation'>;
type Tails = { readonly pLess: number; readonly pGreater: number; readonly pTwoSided: number };

const TAIL: Readonly<Record<Alternative, { label: string; other: (tails: Tails) => readonly [string, number] }>> = {
	less: { label: 'p, falls', other: (tails) => ['rises', tails.pGreater] },
	greater: { label: 'p, rises', other: (tails) => ['falls', tails.pLess] },
	'two-sided': {
		label: 'p, both ways',
		other: (tails) => (tails.pLess <= tails.pGreater ? ['falls', tails.pLess] : ['rises', tails.pGreater])
	}
};

/** The four figures under the sentence: slope, p, p within the deepest split, species, with the share of pairs at the root. */
export function fourFigures({ compared, species, regression, permutation }: Told): readonly [Figure, Figure, Figure, Figure] {
	const { alternative, ageUnit, transform } = compared;
	return [
		{
			label: `Slope ${unitWords(ageUnit).per}`,
			value: formatSlope(regression.slope),
			note: `${transform === 'logit' ? 'logit scale, ' : ''}r ${formatSlope(regression.r, 2)}`
		},
		{ label: TAIL[alternative].label, value: pOf(permutation, alternative), note: pNote(permutation, alternative) },
		withinFigure(permutation.withinDeepestSplit, alternative),
		{ label: 'Species', value: formatCount(species), note: rootNote(permutation) }
	];
}

function rootNote({ withinDeepestSplit, distinctAges }: AnalysisResult['permutation']): string {
	if (withinDeepestSplit === null) return `${formatCount(distinctAges)} different ages`;
	return `${formatShare(withinDeepestSplit.rootPairShare)} of their pairs meet at the root`;
}

type Tested = Tails & { readonly exact: boolean; readonly count: number };

function pOf(tested: Tested, alternative: Alternative): string {
	const p = { less: tested.pLess, greater: tested.pGreater, 'two-sided': tested.pTwoSided }[alternative];
	const sides = alternative === 'two-sided' ? 2 : 1;
	return formatP(p, tested.exact ? null : sides / (tested.count + 1));
}

function pNote(permutation: AnalysisResult['permutation'], alternative: Alternative): string {
	const [name, p] = TAIL[alternative].other(permutation);
	const floor = permutation.exact ? null : 1 / (permutation.count + 1);
	const error = permutation.exact ? 'exact' : `± ${formatSlope(permutation.monteCarloStandardError, 1)}`;
	return `${name} ${formatP(p, floor).replace('= ', '')} · ${error}`;
}

function withinFigure(within: AnalysisResult['permutation']['withinDeepestSplit'], alternative: Alternative): Figure {
	const label = 'p within the deepest split';
	if (within === null) return { label, value: 'not tested', note: 'too few species on a side' };
	return { label, value: pOf(within, alternative), note: `sides of ${within.sides.map(formatCount).join(' and ')} species` };
}
