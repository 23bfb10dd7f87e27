import { symmetricMatrix } from '../pairValues.ts';

/** Fixed vectors and moved matrices that one visit of a pair reads together: the six sums then stay in registers. */
const FIXED_WIDTH = 2;
const MOVED_WIDTH = 3;

/** K fixed vectors over pairs, and B matrices whose rows and columns move, side by side in groups of two and three. */
export type CrossSumInput = {
	readonly tipCount: number;
	/** K */
	readonly fixedCount: number;
	/** B */
	readonly movedCount: number;
	/** each of shape (pairs, 2): strict lower triangles, row by row; the last is filled up with 0 */
	readonly fixed: readonly Float64Array[];
	/** each of shape (n, n, 3), row-major; the last is filled up with 0 */
	readonly moved: readonly Float64Array[];
	/** the sums of one pair of vectors and three matrices, overwritten */
	readonly tile: Float64Array;
};

/** Lower triangles, row by row, made ready for `crossSumsInPlace`. */
export function crossSumInput(fixed: readonly Float64Array[], moved: readonly Float64Array[], tipCount: number): CrossSumInput {
	const squares = moved.map((lower) => symmetricMatrix(lower, tipCount, 0));
	return {
		tipCount,
		fixedCount: fixed.length,
		movedCount: moved.length,
		fixed: sideBySide(fixed, FIXED_WIDTH),
		moved: sideBySide(squares, MOVED_WIDTH),
		tile: new Float64Array(FIXED_WIDTH * MOVED_WIDTH)
	};
}

function sideBySide(vectors: readonly Float64Array[], width: number): Float64Array[] {
	return Array.from({ length: Math.ceil(vectors.length / width) }, (_, group) => {
		const members = vectors.slice(group * width, (group + 1) * width);
		const all = new Float64Array(width * (members[0]?.length ?? 0));
		for (const [k, vector] of members.entries()) for (const [i, value] of vector.entries()) all[i * width + k] = value;
		return all;
	});
}

/**
 * For every fixed vector f and moved matrix M, Σ over pairs of f_ij M_π(i)π(j): all that the statistics of one
 * arrangement are made of. Pairs are added in the order of the lower triangle, so equal input gives equal bits.
 *
 * @param sums - overwritten; shape (B, K), row-major
 * @param arrangement - shape (n,); the row of the matrices that stands at each tip position. Cost: pairs · K · B
 */
export function crossSumsInPlace(sums: Float64Array, input: CrossSumInput, arrangement: Int32Array): void {
	const { fixed, moved, tile, fixedCount, movedCount } = input;
	for (const [movedGroup, matrices] of moved.entries()) {
		for (const [fixedGroup, vectors] of fixed.entries()) {
			sumTileInPlace(tile, { vectors, matrices }, arrangement);
			for (let k = 0; k < tile.length; k++) {
				const row = movedGroup * MOVED_WIDTH + Math.floor(k / FIXED_WIDTH);
				const column = fixedGroup * FIXED_WIDTH + (k % FIXED_WIDTH);
				if (row < movedCount && column < fixedCount) sums[row * fixedCount + column] = tile[k] ?? 0;
			}
		}
	}
}

type Tile = { readonly vectors: Float64Array; readonly matrices: Float64Array };

/** Written out for two vectors and three matrices: a third of the time of a loop over them. */
function sumTileInPlace(tile: Float64Array, { vectors, matrices }: Tile, arrangement: Int32Array): void {
	const tipCount = arrangement.length;
	let [a0, a1, b0, b1, c0, c1] = [0, 0, 0, 0, 0, 0];
	let pair = 0;
	for (let i = 1; i < tipCount; i++) {
		const row = (arrangement[i] ?? 0) * tipCount;
		for (let j = 0; j < i; j++) {
			const cell = (row + (arrangement[j] ?? 0)) * MOVED_WIDTH;
			const f0 = vectors[pair] ?? 0;
			const f1 = vectors[pair + 1] ?? 0;
			const a = matrices[cell] ?? 0;
			const b = matrices[cell + 1] ?? 0;
			const c = matrices[cell + 2] ?? 0;
			a0 += f0 * a;
			a1 += f1 * a;
			b0 += f0 * b;
			b1 += f1 * b;
			c0 += f0 * c;
			c1 += f1 * c;
			pair += FIXED_WIDTH;
		}
	}
	tile[0] = a0;
	tile[1] = a1;
	tile[2] = b0;
	tile[3] = b1;
	tile[4] = c0;
	tile[5] = c1;
}
