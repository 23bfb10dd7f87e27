import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { formatCount, formatFixed, formatP } from './numbers.ts';

type Told = Pick<AnalysisResult, 'partial' | 'matrixRegression' | 'compared'>;
type Alternative = AnalysisResult['compared']['alternative'];

/** Beyond this inflation a coefficient can hardly be told from that of its companions. Common practice. */
const MUCH_INFLATION = 10;

/** The last decimal of a per cent that is written. */
const WRITTEN_STEP = 0.001;

const STILL = { less: 'falls', greater: 'rises' } as const;

/** What age tells of overlap beside the covariates; null where the plan allows for none. */
export function covariateSentence({ partial, matrixRegression, compared }: Told): string | null {
	if (partial === undefined || matrixRegression === undefined) return null;
	const names = allowedFor(matrixRegression);
	const numbers = `(partial r = ${formatFixed(partial.r, 2)}, p ${formatP(partial.p, covariateFloor(partial, compared.alternative))})`;
	const { ageP } = matrixRegression.unique;
	const share = `Age alone explains ${formatPoints(matrixRegression.unique.age)} of the variation among pairs, p ${formatP(ageP, covariateFloor(partial, 'less'))}.`;
	return `After allowing for ${names}, which does not remove spatial structure, ${claim(partial, compared)} ${numbers}. ${share}`;
}

function claim({ p, r }: NonNullable<Told['partial']>, { alpha, alternative }: Told['compared']): string {
	const direction = alternative === 'two-sided' ? (r < 0 ? 'less' : 'greater') : alternative;
	if (p <= alpha) return `overlap still ${STILL[direction]} with age`;
	const noun = { less: 'fall', greater: 'rise', 'two-sided': 'change' }[alternative];
	return `no ${noun} of overlap with age was detected`;
}

/** “distance”, “distance” and “range size”. */
export function allowedFor({ coefficients }: NonNullable<Told['matrixRegression']>): string {
	const names = coefficients.slice(1).map(({ name }) => `“${name}”`);
	const last = names.pop() ?? '';
	return names.length === 0 ? last : `${names.join(', ')} and ${last}`;
}

/** The smallest p that the shuffles can give; null when exact. */
export function covariateFloor({ exact, count }: NonNullable<Told['partial']>, alternative: Alternative): number | null {
	return exact ? null : (alternative === 'two-sided' ? 2 : 1) / (count + 1);
}

/** A share of R² in per cent, with one decimal: parts must be seen to add up. */
export function formatPoints(share: number): string {
	return `${formatFixed(isBelowZero(share) ? share * 100 : Math.max(0, share * 100), 1)} %`;
}

/** Below zero still when written down: less is the rounding of what is written, or of the sums. */
export function isBelowZero(share: number): boolean {
	return share <= -WRITTEN_STEP / 2;
}

const SIZES =
	'In simulations of ranges that drift in a smooth climate, without any evolution of niches, the simple test found a fall in 36 to 67 % of cases ' +
	'and the tests that allow for distance still did in 11 to 23 %, at a level of 5 %. ' +
	'And where conserved niches keep relatives apart, allowing for distance takes away part of what was asked: read both results.';

/** What must stand beside the numbers; first, covariates that hardly differ from age. */
export function covariateCaution({ matrixRegression }: Told): string | null {
	if (matrixRegression === undefined) return null;
	const [age, ...covariates] = matrixRegression.coefficients;
	const closest = covariates.reduce<(typeof covariates)[number] | undefined>(
		(most, one) => (Math.abs(one.rWithAge ?? 0) > Math.abs(most?.rWithAge ?? 0) ? one : most),
		undefined
	);
	if (age === undefined || closest === undefined || age.varianceInflation < MUCH_INFLATION) return SIZES;
	return `Age and the covariates go together (variance inflation ${formatCount(age.varianceInflation)}; r of age and “${closest.name}” ${formatFixed(closest.rWithAge ?? 0, 2)}): their parts can hardly be told from one another. ${SIZES}`;
}
