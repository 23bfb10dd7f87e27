import type { SpeciesGroup } from './cladeList.ts';
import type { WithinSums } from './withinSums.ts';

/** Positions whose pairs are summed, and what of a group they are: its members, or everybody else. */
type Summed = { readonly positions: Int32Array; readonly isRest: boolean };

/**
 * For any groups, each by its own pairs. A group that leaves few species out at one end is found from those: the pairs
 * inside it are all pairs, less the row sums of the rest, plus the pairs inside the rest. So the two sides of one split
 * cost the smaller of them, once. Cost per arrangement: the squares of the smaller sides, halved.
 *
 * @param matrix - shape (n, n), row-major, symmetric
 */
export function directWithinSums(groups: readonly SpeciesGroup[], count: number, matrix: Float64Array): WithinSums {
	const rows = rowSums(matrix, count);
	const total = rows.reduce((sum, value) => sum + value, 0) / 2;
	const summed = groups.map(({ members }) => smallerSide(members, count));
	const keys = summed.map(({ positions }) => positions.join());
	const first = keys.map((key) => keys.indexOf(key));
	return ({ count: drawnCount, arrangements }) => {
		const within = new Float64Array(drawnCount * groups.length);
		const sums = new Float64Array(groups.length);
		for (let drawn = 0; drawn < drawnCount; drawn++) {
			const arrangement = arrangements.subarray(drawn * count, (drawn + 1) * count);
			for (const [g, { positions, isRest }] of summed.entries()) {
				const known = first[g] ?? g;
				sums[g] = known < g ? (sums[known] ?? 0) : pairSum(matrix, count, chosen(arrangement, positions));
				const rest = isRest ? total - rowsOf(rows, arrangement, positions) : 0;
				within[drawn * groups.length + g] = rest + (sums[g] ?? 0);
			}
		}
		return within;
	};
}

/** Sums of the rows of a symmetric matrix without its diagonal. */
export function rowSums(matrix: Float64Array, count: number): Float64Array {
	return Float64Array.from({ length: count }, (_, row) => {
		let sum = 0;
		for (let column = 0; column < count; column++) if (column !== row) sum += matrix[row * count + column] ?? 0;
		return sum;
	});
}

function smallerSide(members: Int32Array, count: number): Summed {
	const from = members[0] ?? 0;
	const to = from + members.length;
	const isRun = members.at(-1) === to - 1;
	const touchesAnEnd = from === 0 || to === count;
	if (!isRun || !touchesAnEnd || 2 * members.length < count) return { positions: members, isRest: false };
	const restFrom = from === 0 ? to : 0;
	return { positions: Int32Array.from({ length: count - members.length }, (_, i) => restFrom + i), isRest: true };
}

function chosen(arrangement: Int32Array, positions: Int32Array): Int32Array {
	return positions.map((position) => arrangement[position] ?? 0);
}

function rowsOf(rows: Float64Array, arrangement: Int32Array, positions: Int32Array): number {
	let sum = 0;
	for (const position of positions) sum += rows[arrangement[position] ?? 0] ?? 0;
	return sum;
}

function pairSum(matrix: Float64Array, count: number, species: Int32Array): number {
	let sum = 0;
	for (let i = 1; i < species.length; i++) {
		const start = (species[i] ?? 0) * count;
		for (let j = 0; j < i; j++) sum += matrix[start + (species[j] ?? 0)] ?? 0;
	}
	return sum;
}
