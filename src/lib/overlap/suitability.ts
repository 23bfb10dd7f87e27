import { InputError } from '#lib/remarks/inputError.ts';

/** One species' suitability over cells, or its counts over bins: non-negative, in any unit. */
export type Suitability = ArrayLike<number>;

/** @throws {InputError} `lengths-differ` */
export function refuseUnequalLengths(p: Suitability, q: Suitability): void {
	if (p.length === q.length) return;
	throw new InputError('lengths-differ', `Expected both species over the same cells; they have ${p.length} and ${q.length}.`);
}

/**
 * @returns the largest value
 * @throws {InputError} `non-finite`, `negative-suitability`, `zero-suitability`
 */
export function refuseValues(vector: Suitability): number {
	let most = 0;
	for (let c = 0; c < vector.length; c++) {
		const value = vector[c] ?? Number.NaN;
		if (!Number.isFinite(value)) {
			throw new InputError(
				'non-finite',
				`Expected a finite suitability in every cell; cell ${c + 1} has ${value}. Drop cells that are missing in any species.`
			);
		}
		if (value < 0)
			throw new InputError('negative-suitability', `Expected suitability of at least 0; cell ${c + 1} has ${value}.`);
		if (value > most) most = value;
	}
	if (most === 0)
		throw new InputError(
			'zero-suitability',
			'Expected suitability above 0 in at least one cell; a species with none has no overlap.'
		);
	return most;
}

/** The vector scaled to sum to 1. Divides by the largest value first, so that neither 1e-300 nor 1e300 is lost. */
export function asShares(vector: Suitability): Float64Array {
	const most = refuseValues(vector);
	const scaled = Float64Array.from(vector, (value) => value / most);
	const total = scaled.reduce((sum, value) => sum + value, 0);
	for (let c = 0; c < scaled.length; c++) scaled[c] = (scaled[c] ?? 0) / total;
	return scaled;
}

/** How many cells hold both species, the first, and the second; a species is present where its value is above 0. */
export function presences(p: Suitability, q: Suitability): { both: number; first: number; second: number } {
	refuseUnequalLengths(p, q);
	for (const vector of [p, q]) refuseValues(vector);
	const count = { both: 0, first: 0, second: 0 };
	for (let c = 0; c < p.length; c++) {
		const [inFirst, inSecond] = [(p[c] ?? 0) > 0, (q[c] ?? 0) > 0];
		if (inFirst) count.first += 1;
		if (inSecond) count.second += 1;
		if (inFirst && inSecond) count.both += 1;
	}
	return count;
}

/**
 * The cells that have a value in every vector, so that all are compared over the same area. A cell missing in one species
 * (NaN) is dropped for all: missing is not zero.
 *
 * @param vectors - shape (species, cells); NaN where missing
 * @returns the vectors over the kept cells, and the indices of these
 * @throws {InputError} `lengths-differ`, `no-shared-cells`
 */
export function dropMissingCells(vectors: readonly Suitability[]): { vectors: Float64Array[]; kept: number[] } {
	const [first] = vectors;
	for (const vector of vectors) if (first !== undefined) refuseUnequalLengths(first, vector);
	const kept: number[] = [];
	for (let c = 0; c < (first?.length ?? 0); c++) {
		if (vectors.every((vector) => !Number.isNaN(vector[c] ?? Number.NaN))) kept.push(c);
	}
	if (kept.length === 0)
		throw new InputError('no-shared-cells', 'Expected at least one cell with a value in every species; there is none.');
	return { vectors: vectors.map((vector) => Float64Array.from(kept, (c) => vector[c] ?? Number.NaN)), kept };
}
