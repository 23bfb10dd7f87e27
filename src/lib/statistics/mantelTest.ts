import { arrangementCount, identityArrangement, nextArrangementInPlace, shuffleInPlace } from './arrangements.ts';
import { assertOverlap } from './assertOverlap.ts';
import { linearRegression } from './linearRegression.ts';
import { midRanks } from './midRanks.ts';
import { lowerTriangle, symmetricMatrix } from './pairValues.ts';
import { permutationPValue, type TailProbabilities } from './permutationPValue.ts';
import { randomStream, STREAM_DOMAIN } from './randomStream.ts';
import { CHUNK_SHUFFLES } from './shuffleBatches.ts';
import type { TailCounts } from './tally.ts';

export type MantelTestOptions = {
	/** m; the null is enumerated when the n! arrangements are no more, and always up to 8 rows */
	readonly permutations: number;
	readonly seed: number;
};

export type MantelTested = TailCounts & TailProbabilities & { readonly statistic: number };
export type MantelTest = {
	readonly exact: boolean;
	readonly count: number;
	readonly pearson: MantelTested;
	readonly spearman: MantelTested;
};

/** As in the design of the tree's test: far above rounding, far below any step of real data. */
const TIE_SHARE = 1e-10;

/**
 * Mantel's test of any two symmetric matrices, such as overlap and geographic distance, by the plain double loop: rows
 * and columns of the second move together. Where a matrix comes from a tree, `permutationTest` gives the same counts
 * from the same seed and is several times faster. Cost: two products per pair and arrangement.
 *
 * @param distances - shape (n, n), row-major
 * @param overlap - shape (n, n), row-major, rows in the same order
 * @throws {InputError} `non-finite`, `asymmetric`; as `linearRegression` where one matrix has no variation
 * @see Mantel (1967), Cancer Research 27:209-220
 */
export function mantelTest(distances: Float64Array, overlap: Float64Array, options: MantelTestOptions): MantelTest {
	const n = Math.round(Math.sqrt(distances.length));
	assertOverlap(distances, n);
	assertOverlap(overlap, n);
	const a = lowerTriangle(distances, n);
	const b = lowerTriangle(overlap, n);
	const pearson = newTest(a, b, n);
	const spearman = newTest(midRanks(a), midRanks(b), n);
	const group = { from: 0, to: n };
	const all = arrangementCount([group]);
	const exact = n <= 8 || all <= options.permutations;
	const count = exact ? all : options.permutations;
	const arrangement = identityArrangement(n);
	let stream = randomStream(options.seed, 0, STREAM_DOMAIN.free);
	for (let done = 0; done < count; done++) {
		if (!exact) {
			if (done > 0 && done % CHUNK_SHUFFLES === 0) {
				stream = randomStream(options.seed, done / CHUNK_SHUFFLES, STREAM_DOMAIN.free);
				arrangement.set(identityArrangement(n));
			}
			shuffleInPlace(arrangement, stream, group);
		}
		judgeInPlace(pearson, arrangement);
		judgeInPlace(spearman, arrangement);
		if (exact) nextArrangementInPlace(arrangement, [group]);
	}
	return { exact, count, pearson: tested(pearson, count, exact), spearman: tested(spearman, count, exact) };
}

type RunningTest = {
	/** standardised lower triangle of the matrix that stays */
	readonly fixed: Float64Array;
	/** standardised matrix whose rows and columns move, shape (n, n) */
	readonly moved: Float64Array;
	readonly observed: number;
	readonly tie: number;
	readonly statistic: number;
	less: number;
	greater: number;
};

function newTest(a: Float64Array, b: Float64Array, n: number): RunningTest {
	const statistic = linearRegression(a, b).r;
	const fixed = standardised(a);
	const moved = symmetricMatrix(standardised(b), n, 0);
	const products = lowerTriangle(moved, n).map((value, pair) => Math.abs(value * (fixed[pair] ?? 0)));
	const tie = TIE_SHARE * products.reduce((sum, value) => sum + value, 0);
	const observed = movedCorrelation(fixed, moved, identityArrangement(n));
	return { fixed, moved, observed, tie, statistic, less: 0, greater: 0 };
}

/** Centred and divided by the root of the sum of squares, so that the sum of products is the correlation. */
function standardised(values: Float64Array): Float64Array {
	const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
	const norm = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0));
	return values.map((value) => (value - mean) / norm);
}

function movedCorrelation(fixed: Float64Array, moved: Float64Array, arrangement: Int32Array): number {
	const n = arrangement.length;
	let sum = 0;
	let pair = 0;
	for (let i = 1; i < n; i++) {
		const row = (arrangement[i] ?? 0) * n;
		for (let j = 0; j < i; j++) sum += (fixed[pair++] ?? 0) * (moved[row + (arrangement[j] ?? 0)] ?? 0);
	}
	return sum;
}

function judgeInPlace(test: RunningTest, arrangement: Int32Array): void {
	const value = movedCorrelation(test.fixed, test.moved, arrangement);
	if (value <= test.observed + test.tie) test.less++;
	if (value >= test.observed - test.tie) test.greater++;
}

function tested({ statistic, less, greater }: RunningTest, count: number, exact: boolean): MantelTested {
	return { statistic, less, greater, ...permutationPValue({ less, greater }, count, exact) };
}
