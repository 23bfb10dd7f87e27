import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';

/** Round numbers, made up by hand for the tests of the words beside; no computed result. */
export const exampleTold: Pick<
	AnalysisResult,
	'compared' | 'species' | 'pairs' | 'dropped' | 'regression' | 'permutation' | 'mantel' | 'engine'
> & { readonly nodeAverages: Pick<AnalysisResult['nodeAverages'], 'nested' | 'plain'> } = {
	compared: {
		...{ measure: 'schoener-d', ageUnit: 'Ma', rootAge: 18.4, polytomies: 0, ultrametricSpread: 0, levelled: false },
		...{ tree: { index: 0, name: '', treesInSet: 1 }, meanOverlap: 0.4, alternative: 'less', transform: 'none', alpha: 0.05 }
	},
	...{ species: 26, pairs: 325, dropped: [] },
	regression: { slope: -0.0163, intercept: 0.62, r: -0.33, rSquared: 0.1089, residualStandardDeviation: 0.2 },
	permutation: {
		...{ statistic: 'slope', observed: -0.0163, count: 4999, exact: false, asExtreme: 7, p: 0.0016 },
		...{ pLess: 0.0016, pGreater: 0.9986, pTwoSided: 0.0032, monteCarloStandardError: 0.00057, interval: [0.0006, 0.0029] },
		...{ smallestP: 0.0002, distinctAges: 25, moments: { statistic: 'z', mean: 1, variance: 2, skewness: 0 }, quantiles: [] },
		withinDeepestSplit: {
			...{ pLess: 0.032, pGreater: 0.97, pTwoSided: 0.064, sides: [4, 22], rootPairShare: 0.27 },
			...{ exact: false, count: 4999, smallestP: 0.0002 }
		}
	},
	mantel: { r: -0.33, z: 1234, spearman: -0.3 },
	nodeAverages: {
		nested: { slope: -0.02, intercept: 0.7, rSquared: 0.2, pLess: 0.01, pGreater: 0.99, pTwoSided: 0.02 },
		plain: { slope: -0.019, intercept: 0.7, rSquared: 0.2, pLess: 0.012, pGreater: 0.99, pTwoSided: 0.024 }
	},
	engine: { version: '1.0.0', seed: 23, kernel: 'typescript-blocks' }
};
