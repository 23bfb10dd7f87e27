import { formatCount, formatFixed, formatP, formatShare, formatSlope } from '#lib/analysis/words/numbers.ts';
import { unitWords } from '#lib/analysis/words/units.ts';
import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { Fact } from './planFacts.ts';

type Told = Pick<AnalysisResult, 'compared' | 'regression' | 'permutation' | 'mantel' | 'engine'> & {
	readonly nodeAverages: Pick<AnalysisResult['nodeAverages'], 'nested' | 'plain'>;
};
type Tails = { readonly pLess: number; readonly pGreater: number; readonly pTwoSided: number };
export type FactGroup = { readonly title: string; readonly facts: readonly Fact[] };

/** Every number of the test, in groups, for whoever wants to check it. */
export function testFacts(told: Told): FactGroup[] {
	return [
		{ title: 'All pairs', facts: regressionFacts(told) },
		{ title: 'Shuffled over the whole tree', facts: permutationFacts(told) },
		{ title: 'Shuffled within the deepest split', facts: withinFacts(told) },
		{ title: 'Node means, weighted by branching', facts: nodeFacts(told, told.nodeAverages.nested) },
		{ title: 'Node means, every pair equal', facts: nodeFacts(told, told.nodeAverages.plain) },
		{ title: 'Cross-checks', facts: checkFacts(told) }
	];
}

function regressionFacts({ regression, compared }: Told): Fact[] {
	return [
		{ term: `Slope ${unitWords(compared.ageUnit).per}`, fact: formatSlope(regression.slope, 5) },
		{ term: 'Intercept, a value at age 0 outside the data', fact: formatFixed(regression.intercept, 4) },
		{ term: 'r', fact: formatFixed(regression.r, 4) },
		{ term: 'r²', fact: formatFixed(regression.rSquared, 4) },
		{ term: 'Residual standard deviation', fact: formatFixed(regression.residualStandardDeviation, 4) }
	];
}

function tailFacts(tails: Tails, floor: number | null): Fact[] {
	return [
		{ term: 'p, falls', fact: formatP(tails.pLess, floor) },
		{ term: 'p, rises', fact: formatP(tails.pGreater, floor) },
		{ term: 'p, both ways', fact: formatP(tails.pTwoSided, floor === null ? null : 2 * floor) }
	];
}

const floorOf = ({ exact, count }: { exact: boolean; count: number }) => (exact ? null : 1 / (count + 1));

function permutationFacts({ permutation }: Told): Fact[] {
	const { count, exact, asExtreme, interval, monteCarloStandardError, smallestP, distinctAges } = permutation;
	return [
		...tailFacts(permutation, floorOf(permutation)),
		{ term: exact ? 'Relabellings, all there are' : 'Shuffles', fact: formatCount(count) },
		{ term: 'As extreme in the tail asked about', fact: formatCount(asExtreme) },
		{ term: 'Monte Carlo standard error of p', fact: exact ? 'none: exact' : formatSlope(monteCarloStandardError, 2) },
		{
			term: '95 % interval of p',
			fact: interval === null ? 'none: exact' : interval.map((end) => formatSlope(end, 3)).join(' to ')
		},
		{ term: 'Smallest p this tree can give', fact: formatSlope(smallestP, 2) },
		{ term: 'Different ages', fact: formatCount(distinctAges) }
	];
}

function withinFacts({ permutation }: Told): Fact[] {
	const within = permutation.withinDeepestSplit;
	if (within === null) return [{ term: 'Not tested', fact: 'a side of the root holds too few species' }];
	return [
		...tailFacts(within, floorOf(within)),
		{ term: within.exact ? 'Relabellings, all there are' : 'Shuffles', fact: formatCount(within.count) },
		{ term: 'Species on the sides', fact: within.sides.map(formatCount).join(', ') },
		{ term: 'Pairs that meet at the root', fact: formatShare(within.rootPairShare) }
	];
}

function nodeFacts({ permutation, compared }: Told, test: AnalysisResult['nodeAverages']['nested']): Fact[] {
	return [
		{ term: `Slope ${unitWords(compared.ageUnit).per}`, fact: formatSlope(test.slope, 5) },
		{ term: 'Intercept', fact: formatFixed(test.intercept, 4) },
		{ term: 'r²', fact: formatFixed(test.rSquared, 4) },
		...tailFacts(test, floorOf(permutation))
	];
}

function checkFacts({ mantel, permutation, engine }: Told): Fact[] {
	const { mean, variance, skewness } = permutation.moments;
	return [
		{ term: 'Mantel r', fact: formatFixed(mantel.r, 4) },
		{ term: 'Mantel z', fact: formatSlope(mantel.z, 6) },
		{ term: 'Spearman', fact: formatFixed(mantel.spearman, 4) },
		{ term: 'Mean of z over all relabellings', fact: formatSlope(mean, 6) },
		{ term: 'Its variance', fact: formatSlope(variance, 5) },
		{ term: 'Its skewness', fact: skewness === null ? 'not defined' : formatFixed(skewness, 3) },
		{ term: 'Engine, kernel, seed', fact: `${engine.version}, ${engine.kernel}, ${engine.seed}` }
	];
}
