import { InputError } from '#lib/remarks/inputError.ts';
import { midRanksOfRepeated } from '../midRanks.ts';
import type { PermutationStatistic } from '../functionals.ts';
import type { LaidTree } from './posteriorTree.ts';

/** How far each node of a tree stands from the mean, free of the unit and the spread of its ages. */
export type NodeScores = {
	/** shape (internal nodes,); Σ score² over what is counted is 1 */
	readonly scores: Float64Array;
	/** root of the sum of squares that was divided out; unit of the ages, of log2 age, or of ranks */
	readonly spread: number;
};

/** Ages that differ by no more than this share of the oldest are one age, as in `linearRegression`. */
const AGE_TOLERANCE = 1e-9;

/**
 * (x - mean x) / sqrt(SS x), where x is the age, its logarithm or its rank, and pairs or nodes are counted, as the statistic
 * has it. A slope is the sum of score times overlap, divided by `spread`.
 *
 * @throws {InputError} `constant-ages`; `age-zero` for the logarithm of an age of 0
 */
export function nodeScores(statistic: PermutationStatistic, laid: LaidTree): NodeScores {
	const ages = laid.ages.subarray(0, laid.internalCount);
	const pairs = laid.pairs.subarray(0, laid.internalCount);
	assertAgesDiffer(ages);
	if (statistic === 'nodes-plain' || statistic === 'nodes-nested') return standardised(ages, null);
	return standardised(readAges(statistic, ages, pairs), pairs);
}

function readAges(statistic: PermutationStatistic, ages: Float64Array, pairs: Float64Array): Float64Array {
	if (statistic === 'spearman') return midRanksOfRepeated(ages, pairs);
	if (statistic !== 'slope-log-age') return ages;
	return ages.map((age) => {
		if (age > 0) return Math.log2(age);
		throw new InputError(
			'age-zero',
			'The slope on the logarithm of age needs every common ancestor older than 0; at least one has age 0. Choose the slope on age.'
		);
	});
}

/** Without counts, each value counts once. */
function standardised(x: Float64Array, counts: Float64Array | null): NodeScores {
	let total = 0;
	let sum = 0;
	for (let i = 0; i < x.length; i++) {
		const count = counts === null ? 1 : (counts[i] ?? 0);
		total += count;
		sum += count * (x[i] ?? 0);
	}
	const mean = sum / total;
	const scores = new Float64Array(x.length);
	let squares = 0;
	for (let i = 0; i < x.length; i++) {
		const deviation = (x[i] ?? 0) - mean;
		scores[i] = deviation;
		squares += (counts === null ? 1 : (counts[i] ?? 0)) * deviation * deviation;
	}
	const spread = Math.sqrt(squares);
	for (let i = 0; i < x.length; i++) scores[i] = (scores[i] ?? 0) / spread;
	return { scores, spread };
}

function assertAgesDiffer(ages: Float64Array): void {
	let youngest = Number.POSITIVE_INFINITY;
	let oldest = 0;
	for (let slot = 0; slot < ages.length; slot++) {
		const age = ages[slot] ?? Number.NaN;
		if (!Number.isFinite(age)) throw new InputError('non-finite', `Expected every node age to be a finite number; got ${age}.`);
		if (age < youngest) youngest = age;
		if (age > oldest) oldest = age;
	}
	if (oldest - youngest > AGE_TOLERANCE * oldest) return;
	throw new InputError('constant-ages', `Expected ages that differ; all ${ages.length} are ${ages[0]}. Bring a resolved tree.`);
}
