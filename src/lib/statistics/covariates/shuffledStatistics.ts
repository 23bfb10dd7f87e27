import type { CovariateDesign } from './covariateDesign.ts';

/**
 * The statistics of one arrangement, all without unit. NaN where the shuffled matrix happens to lie wholly in the
 * predictors, as few species allow.
 */
export type ShuffledStatistics = {
	/** partial correlation of overlap and age, whole overlaps moved */
	raw: number;
	/** the same, with only what the covariates leave of the overlaps moved */
	residual: number;
	/** R² of the regression of the moved overlaps on all predictors */
	rSquared: number;
	/** shape (K,), age last: partial correlation of overlap with what a predictor has of its own, that part being moved */
	readonly semiPartial: Float64Array;
};

export function emptyStatistics({ sums }: CovariateDesign): ShuffledStatistics {
	return { raw: 0, residual: 0, rSquared: 0, semiPartial: new Float64Array(sums.fixedCount) };
}

/** A squared length below this share of the whole is rounding; unit lengths squared. */
const NOTHING_LEFT = 1e-12;

/**
 * Reads the statistics off the cross sums of one arrangement. With Q the K columns, o the overlaps about their mean in
 * units of their length, w = Qᵀ o_π and W = Qᵀ Q_π, and A the columns of the covariates (all but the last, age):
 *
 * - R² = |w|²
 * - raw: w_K / √(1 − |w_A|²), since |o_π| = |o|
 * - residual: the same of e = o − A Aᵀ o, whose sums are w − W_A (Aᵀ o)
 * - semi-partial of predictor j with own direction u: u is moved by the inverse of π, which is as random as π, so that
 *   its sums are those of o_π and Q_π again: u·w − (s − u (u·s))·v over √(1 − |v|² + (u·v)²), v = Wᵀ u, s = Qᵀ o
 *
 * t is an increasing function of the semi-partial correlation: t = ρ √(df / (1 − ρ²)), so both give one p.
 */
export function readStatisticsInPlace(statistics: ShuffledStatistics, design: CovariateDesign, crossSums: Float64Array): void {
	const { shares, own } = design;
	const size = shares.length;
	const last = size - 1;
	let [whole, ofCovariates, left, leftOfCovariates, leftOfAge] = [0, 0, 1, 0, 0];
	for (let a = 0; a < size; a++) {
		const w = crossSums[a] ?? 0;
		let moved = w;
		for (let b = 0; b < last; b++) moved -= (shares[b] ?? 0) * (crossSums[(b + 1) * size + a] ?? 0);
		whole += w * w;
		if (a === last) {
			leftOfAge = moved;
			continue;
		}
		ofCovariates += w * w;
		leftOfCovariates += moved * moved;
		left -= (shares[a] ?? 0) ** 2;
	}
	statistics.rSquared = whole;
	statistics.raw = ratio(crossSums[last] ?? 0, 1 - ofCovariates, 1);
	statistics.residual = ratio(leftOfAge, left - leftOfCovariates, left);
	for (let j = 0; j < size; j++) statistics.semiPartial[j] = semiPartial(crossSums, shares, own[j] ?? shares);
}

function semiPartial(crossSums: Float64Array, shares: Float64Array, own: Float64Array): number {
	const size = shares.length;
	let [ofOverlap, ownShare, explained, ofSelf, squares, leftSquares] = [0, 0, 0, 0, 0, 1];
	for (let b = 0; b < size; b++) {
		const share = shares[b] ?? 0;
		let v = 0;
		for (let a = 0; a < size; a++) v += (own[a] ?? 0) * (crossSums[(b + 1) * size + a] ?? 0);
		ofOverlap += (own[b] ?? 0) * (crossSums[b] ?? 0);
		ownShare += (own[b] ?? 0) * share;
		explained += share * v;
		ofSelf += (own[b] ?? 0) * v;
		squares += v * v;
		leftSquares -= share * share;
	}
	const numerator = ofOverlap - explained + ownShare * ofSelf;
	const leftOfOverlap = leftSquares + ownShare * ownShare;
	return ratio(ratio(numerator, 1 - squares + ofSelf * ofSelf, 1), leftOfOverlap, 1);
}

function ratio(numerator: number, squaredLength: number, whole: number): number {
	return squaredLength > NOTHING_LEFT * whole ? numerator / Math.sqrt(squaredLength) : Number.NaN;
}
