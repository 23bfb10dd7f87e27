import { permutationPValue, type TailProbabilities } from '../permutationPValue.ts';
import { STREAM_DOMAIN } from '../randomStream.ts';
import { plannedArrangements, shuffleBatches } from '../shuffleBatches.ts';
import type { CovariateDesign } from './covariateDesign.ts';
import { crossSumsInPlace } from './crossSums.ts';
import { emptyStatistics, readStatisticsInPlace } from './shuffledStatistics.ts';

export type CovariateTails = TailProbabilities & {
	/** arrangements at least as low, at least as high, and at least as far from 0 as the observed one */
	readonly less: number;
	readonly greater: number;
	readonly farther: number;
};

export type CovariateOutcome = {
	readonly exact: boolean;
	/** number of arrangements when exact (the observed one is among them), else m shuffles */
	readonly count: number;
	/** partial correlation of overlap and age; what the covariates leave of the overlaps is moved */
	readonly residual: CovariateTails;
	/** the same statistic, whole overlaps moved: the check, to be avoided with outliers */
	readonly raw: CovariateTails;
	readonly r: number;
	/** by double semi-partialing; age first, then the covariates in order */
	readonly coefficients: readonly CovariateTails[];
	/** p of R², upper tail */
	readonly pOfRSquared: number;
	/** p of the part of R² that age alone explains, upper tail: the semi-partialing of age, either direction */
	readonly pOfAgePart: number;
};

/** Two correlations this close are one value; far above rounding, far below any step of real data. */
const TIE = 1e-10;

type Tally = { readonly observed: number; less: number; greater: number; farther: number };

/**
 * Tests what age tells of overlap after allowing for the covariates, by the same shuffles as the free question of
 * `permutationTest` with equal species, seed and number.
 *
 * The residual and semi-partial shuffles are exact only as species grow many; none of them removes spatial structure
 * that overlap and tree share.
 *
 * Cost: shuffles · pairs · K · (K + 1) for K predictors.
 *
 * @see Smouse, Long & Sokal (1986), doi:10.2307/2413122; Legendre (2000), doi:10.1080/00949650008812035, method 2;
 * Dekker, Krackhardt & Snijders (2007), doi:10.1007/s11336-007-9016-1
 */
export function covariateTest(
	design: CovariateDesign,
	{ permutations, seed }: { readonly permutations: number; readonly seed: number }
): CovariateOutcome {
	const { sums } = design;
	const groups = [{ from: 0, to: sums.tipCount }];
	const { exact, count } = plannedArrangements({ groups, permutations });
	const statistics = emptyStatistics(design);
	readStatisticsInPlace(statistics, design, design.observed);
	const raw = newTally(statistics.raw);
	const residual = newTally(statistics.residual);
	const rSquared = newTally(statistics.rSquared);
	const semiPartial = Array.from(statistics.semiPartial, newTally);
	const crossSums = new Float64Array(design.observed.length);
	const question = { tipCount: sums.tipCount, groups, domain: STREAM_DOMAIN.free, seed, permutations };
	for (const batch of shuffleBatches(question)) {
		for (let k = 0; k < batch.count; k++) {
			crossSumsInPlace(crossSums, sums, batch.arrangements.subarray(k * sums.tipCount, (k + 1) * sums.tipCount));
			readStatisticsInPlace(statistics, design, crossSums);
			countInPlace(raw, statistics.raw);
			countInPlace(residual, statistics.residual);
			countInPlace(rSquared, statistics.rSquared);
			for (let j = 0; j < semiPartial.length; j++) {
				const tally = semiPartial[j];
				if (tally) countInPlace(tally, statistics.semiPartial[j] ?? Number.NaN);
			}
		}
	}
	const read = (tally: Tally): CovariateTails => tailsOf(tally, count, exact);
	const coefficients = [...semiPartial.slice(-1), ...semiPartial.slice(0, -1)].map(read);
	const ofAge = semiPartial.at(-1) ?? raw;
	return {
		exact,
		count,
		residual: read(residual),
		raw: read(raw),
		r: Math.max(-1, Math.min(1, residual.observed)),
		coefficients,
		pOfRSquared: read(rSquared).pGreater,
		pOfAgePart: permutationPValue({ less: count, greater: ofAge.farther }, count, exact).pGreater
	};
}

function newTally(observed: number): Tally {
	return { observed, less: 0, greater: 0, farther: 0 };
}

/** An arrangement whose statistic is undefined counts as extreme on every side: it may cost power, never validity. */
function countInPlace(tally: Tally, value: number): void {
	if (!(value > tally.observed + TIE)) tally.less++;
	if (!(value < tally.observed - TIE)) tally.greater++;
	if (!(Math.abs(value) < Math.abs(tally.observed) - TIE)) tally.farther++;
}

function tailsOf({ less, greater, farther }: Tally, count: number, exact: boolean): CovariateTails {
	return { less, greater, farther, ...permutationPValue({ less, greater }, count, exact) };
}
