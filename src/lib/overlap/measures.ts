import { averageRanks } from './averageRanks.ts';
import { asShares, presences, refuseUnequalLengths, refuseValues, type Suitability } from './suitability.ts';
import { InputError } from '#lib/remarks/inputError.ts';

/**
 * Schoener's D: the shared part of two distributions over the same cells, sum_c min(p_c, q_c) = 1 − ½ sum_c |p_c − q_c|.
 * Each vector is scaled to sum to 1 first; of the two forms the one that loses no digits is taken.
 *
 * @param p - shape (cells,); non-negative, not all zero, any unit
 * @param q - the same for the other species
 * @returns overlap in [0, 1]; dimensionless
 * @throws {InputError} `lengths-differ`, `non-finite`, `negative-suitability`, `zero-suitability`
 * @see Schoener (1968), Ecology 49:704–726
 */
export function schoenersD(p: Suitability, q: Suitability): number {
	const [a, b] = shares(p, q);
	const shared = sumOf(a, (share, c) => Math.min(share, b[c] ?? 0));
	return shared < 0.5 ? shared : 1 - sumOf(a, (share, c) => Math.abs(share - (b[c] ?? 0))) / 2;
}

/**
 * Warren's I as corrected: I = 1 − ½ sum_c (√p_c − √q_c)² = sum_c √(p_c q_c). The form printed in 2008 took the root of the
 * sum and cannot fall below 0.29; see `correctedI`.
 *
 * @param p - shape (cells,); non-negative, not all zero, any unit
 * @param q - the same for the other species
 * @returns overlap in [0, 1]; dimensionless
 * @throws {InputError} as `schoenersD`
 * @see Warren, Glor & Turelli (2008), Evolution 62:2868–2883, with the erratum
 */
export function warrensI(p: Suitability, q: Suitability): number {
	const [a, b] = shares(p, q).map((vector) => vector.map(Math.sqrt));
	if (a === undefined || b === undefined) return Number.NaN;
	const shared = sumOf(a, (root, c) => root * (b[c] ?? 0));
	return shared < 0.5 ? shared : 1 - sumOf(a, (root, c) => (root - (b[c] ?? 0)) ** 2) / 2;
}

/**
 * Pianka's overlap: sum pq / √(sum p² sum q²), the cosine of the two vectors.
 *
 * @param p - shape (cells,); non-negative, not all zero, any unit
 * @param q - the same for the other species
 * @returns overlap in [0, 1]; dimensionless
 * @throws {InputError} as `schoenersD`
 * @see Pianka (1973), Annual Review of Ecology and Systematics 4:53–74
 */
export function pianka(p: Suitability, q: Suitability): number {
	const { cross, pp, qq } = products(p, q);
	return Math.min(1, cross / (Math.sqrt(pp) * Math.sqrt(qq)));
}

/**
 * Morisita–Horn overlap: 2 sum pq / (sum p² + sum q²) of the two distributions.
 *
 * @param p - shape (cells,); non-negative, not all zero, any unit
 * @param q - the same for the other species
 * @returns overlap in [0, 1], never above Pianka's; dimensionless
 * @throws {InputError} as `schoenersD`
 * @see Horn (1966), American Naturalist 100:419–424
 */
export function morisitaHorn(p: Suitability, q: Suitability): number {
	const { cross, pp, qq } = products(p, q);
	return Math.min(1, (2 * cross) / (pp + qq));
}

/**
 * Jaccard overlap of two sets of cells: |A ∩ B| / |A ∪ B|. A cell belongs to a set when its value is above 0.
 *
 * @returns overlap in [0, 1]; dimensionless
 * @throws {InputError} as `schoenersD`
 */
export function jaccard(p: Suitability, q: Suitability): number {
	const { both, first, second } = presences(p, q);
	return both / (first + second - both);
}

/** Sørensen overlap of two sets of cells: 2 |A ∩ B| / (|A| + |B|). Otherwise as `jaccard`. */
export function sorensen(p: Suitability, q: Suitability): number {
	const { both, first, second } = presences(p, q);
	return (2 * both) / (first + second);
}

/**
 * Range overlap: |A ∩ B| / min(|A|, |B|), the share of the smaller range inside the larger. It is 1 for nested ranges
 * however they differ in size, so it does not measure equality of niches. Otherwise as `jaccard`.
 *
 * @see Chesser & Zink (1994), Evolution 48:490–497
 */
export function rangeOverlap(p: Suitability, q: Suitability): number {
	const { both, first, second } = presences(p, q);
	return both / Math.min(first, second);
}

/**
 * Spearman's rank correlation of two suitabilities over the same cells, ties sharing their mean rank. It asks whether
 * both rank the cells alike, not how much they share; negative values mean opposite preference.
 *
 * @returns correlation in [-1, 1]; dimensionless
 * @throws {InputError} as `schoenersD`, and `constant-suitability` when all cells are equal
 * Cost: n log n in the cells.
 */
export function spearmanCells(p: Suitability, q: Suitability): number {
	refuseUnequalLengths(p, q);
	for (const vector of [p, q]) refuseValues(vector);
	const [a, b] = [averageRanks(p), averageRanks(q)];
	const mean = (a.length + 1) / 2;
	const [aa, bb] = [a, b].map((ranks) => sumOf(ranks, (rank) => (rank - mean) ** 2));
	if (!aa || !bb) {
		throw new InputError(
			'constant-suitability',
			'Expected suitability to differ between cells; all cells of one species are equal.'
		);
	}
	const cross = sumOf(a, (rank, c) => (rank - mean) * ((b[c] ?? 0) - mean));
	return Math.max(-1, Math.min(1, cross / Math.sqrt(aa * bb)));
}

function shares(p: Suitability, q: Suitability): [Float64Array, Float64Array] {
	refuseUnequalLengths(p, q);
	return [asShares(p), asShares(q)];
}

function products(p: Suitability, q: Suitability): { cross: number; pp: number; qq: number } {
	const [a, b] = shares(p, q);
	const cross = sumOf(a, (share, c) => share * (b[c] ?? 0));
	return { cross, pp: sumOf(a, (share) => share * share), qq: sumOf(b, (share) => share * share) };
}

function sumOf(vector: Float64Array, term: (value: number, index: number) => number): number {
	let sum = 0;
	for (let c = 0; c < vector.length; c++) sum += term(vector[c] ?? 0, c);
	return sum;
}
