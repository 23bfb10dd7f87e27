export type Moments = {
	readonly mean: number;
	readonly variance: number;
	/** null when every arrangement gives the same z */
	readonly skewness: number | null;
};

/**
 * Mean, variance and skewness of Mantel's z = Σ_{i<j} a_ij b_π(i)π(j) over all n! arrangements, in closed form: the
 * k-th moment is a sum over the ways in which k pairs can share members, each with its number of vertices v; ways with
 * v > n do not occur. Both matrices are centred first, which moves only the mean and spares the differences of large
 * moments. Cost: n³/6 products for the triangles of each matrix, about 3 s at 2,000 species.
 *
 * @param a - shape (n, n), row-major, symmetric; the diagonal is not read
 * @param b - same shape
 * @returns mean and variance of z in the unit of a b, and its square
 * @see Mantel (1967), Cancer Research 27:209-220, for the first two; Mielke (1978), Biometrics 34:277, for the third
 */
export function mantelMoments(a: Float64Array, b: Float64Array): Moments {
	const n = Math.round(Math.sqrt(a.length));
	const pairs = (n * (n - 1)) / 2;
	const [meanA, meanB] = [meanOffDiagonal(a, n), meanOffDiagonal(b, n)];
	const sumsA = patternSums(centred(a, n, meanA), n);
	const sumsB = patternSums(centred(b, n, meanB), n);
	const secondMoment = expectation(SECOND, sumsA.second, sumsB.second, n);
	const thirdMoment = expectation(THIRD, sumsA.third, sumsB.third, n);
	// The patterns count ordered pairs, so their sum is 2 z.
	const variance = Math.max(0, secondMoment / 4);
	const spread = 1e-14 * Math.sqrt((sumsA.second[0] ?? 0) * (sumsB.second[0] ?? 0));
	const skewness = variance > spread ? thirdMoment / 8 / variance ** 1.5 : null;
	return { mean: pairs * meanA * meanB, variance, skewness };
}

/** How many ordered choices of pairs make the pattern, and how many different rows it touches. */
type Pattern = { readonly ways: number; readonly vertices: number };

/** Same pair twice; two pairs with one row in common; two pairs apart. */
const SECOND: readonly Pattern[] = [
	{ ways: 2, vertices: 2 },
	{ ways: 4, vertices: 3 },
	{ ways: 1, vertices: 4 }
];

/** Triple pair; double and adjacent; double and apart; triangle; star; path; two adjacent and one apart; three apart. */
const THIRD: readonly Pattern[] = [
	{ ways: 4, vertices: 2 },
	{ ways: 24, vertices: 3 },
	{ ways: 6, vertices: 4 },
	{ ways: 8, vertices: 3 },
	{ ways: 8, vertices: 4 },
	{ ways: 24, vertices: 4 },
	{ ways: 12, vertices: 5 },
	{ ways: 1, vertices: 6 }
];

/** Σ ways · S(a) · S(b) / (n (n-1) … (n-v+1)) over the patterns that fit into n rows. */
function expectation(patterns: readonly Pattern[], sumsA: readonly number[], sumsB: readonly number[], n: number): number {
	let total = 0;
	for (const [index, { ways, vertices }] of patterns.entries()) {
		if (vertices > n) continue;
		let choices = 1;
		for (let k = 0; k < vertices; k++) choices *= n - k;
		total += (ways * (sumsA[index] ?? 0) * (sumsB[index] ?? 0)) / choices;
	}
	return total;
}

/** Sums over distinct rows of the products of cells in each pattern, by inclusion and exclusion of row sums. */
function patternSums(a: Float64Array, n: number): { second: number[]; third: number[] } {
	const { rowSums, rowSquares, cubes, cross } = rowTotals(a, n);
	const A1 = sumOf(rowSums);
	const A2 = sumOf(rowSquares);
	const A3 = sumOf(rowSums.map((r) => r * r));
	const Q = sumOf(rowSums.map((r, i) => r * (rowSquares[i] ?? 0)));
	const R3 = sumOf(rowSums.map((r) => r ** 3));
	const triangles = triangleSum(a, n);
	const doubleAdjacent = Q - cubes;
	const doubleApart = A1 * A2 + 2 * cubes - 4 * Q;
	const star = R3 - 3 * Q + 2 * cubes;
	const path = cross - 2 * Q + cubes - triangles;
	const five = (A3 - A2) * A1 - 4 * doubleAdjacent - 2 * triangles - 2 * star - 4 * path;
	const repeated = 4 * cubes + 24 * doubleAdjacent + 6 * doubleApart + 8 * triangles + 8 * star + 24 * path + 12 * five;
	return {
		second: [A2, A3 - A2, A1 * A1 + 2 * A2 - 4 * A3],
		third: [cubes, doubleAdjacent, doubleApart, triangles, star, path, five, A1 ** 3 - repeated]
	};
}

function rowTotals(a: Float64Array, n: number) {
	const rowSums = new Float64Array(n);
	const rowSquares = new Float64Array(n);
	let cubes = 0;
	for (let i = 0; i < n; i++) {
		for (let j = 0; j < n; j++) {
			const value = a[i * n + j] ?? 0;
			rowSums[i] = (rowSums[i] ?? 0) + value;
			rowSquares[i] = (rowSquares[i] ?? 0) + value * value;
			cubes += value ** 3;
		}
	}
	let cross = 0;
	for (let i = 0; i < n; i++) {
		let row = 0;
		for (let j = 0; j < n; j++) row += (a[i * n + j] ?? 0) * (rowSums[j] ?? 0);
		cross += row * (rowSums[i] ?? 0);
	}
	return { rowSums, rowSquares, cubes, cross };
}

/** Σ_ijk a_ij a_jk a_ki: each triangle of three rows has six orders. */
function triangleSum(a: Float64Array, n: number): number {
	let sum = 0;
	for (let i = 2; i < n; i++) {
		for (let j = 1; j < i; j++) {
			let shared = 0;
			for (let k = 0; k < j; k++) shared += (a[i * n + k] ?? 0) * (a[j * n + k] ?? 0);
			sum += shared * (a[i * n + j] ?? 0);
		}
	}
	return 6 * sum;
}

function meanOffDiagonal(a: Float64Array, n: number): number {
	let sum = 0;
	for (let i = 1; i < n; i++) for (let j = 0; j < i; j++) sum += a[i * n + j] ?? 0;
	return sum / ((n * (n - 1)) / 2);
}

function centred(a: Float64Array, n: number, mean: number): Float64Array {
	return a.map((value, cell) => (cell % (n + 1) === 0 ? 0 : value - mean));
}

function sumOf(values: Float64Array): number {
	return values.reduce((sum, value) => sum + value, 0);
}
