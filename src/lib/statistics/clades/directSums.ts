import type { SpeciesGroup } from './cladeList.ts';
import { runSums } from '../runSums.ts';
import { memberRows, rowSums, runOf } from './memberRows.ts';
import type { WithinSums } from './withinSums.ts';

/** Positions whose pairs are summed, and what of a group they are: its members, or everybody else. */
type Side = { readonly positions: Int32Array; readonly isRest: boolean };

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
	const sides = groups.map(({ members }) => smallerSide(members, count));
	const keys = sides.map(({ positions }) => positions.join());
	const summed = [...new Set(keys)].map((key) => sides[keys.indexOf(key)]?.positions ?? new Int32Array(0));
	const summedOf = Int32Array.from(keys, (key) => [...new Set(keys)].indexOf(key));
	const pairsOf = pairSums(summed, count, matrix);
	const rowsOf = memberRows(
		summed.map((members) => ({ node: null, members })),
		rows
	);
	return (batch) => {
		const within = new Float64Array(batch.count * groups.length);
		const [inside, ofRows] = [pairsOf(batch), rowsOf(batch)];
		for (let drawn = 0; drawn < batch.count; drawn++) {
			for (let g = 0; g < groups.length; g++) {
				const at = drawn * summed.length + (summedOf[g] ?? 0);
				const rest = sides[g]?.isRest === true ? total - (ofRows[at] ?? 0) : 0;
				within[drawn * groups.length + g] = rest + (inside[at] ?? 0);
			}
		}
		return within;
	};
}

/** Neighbours by the compiled kernel; positions with gaps between them one pair after the other. */
function pairSums(summed: readonly Int32Array[], count: number, matrix: Float64Array): WithinSums {
	const runs = summed.flatMap((positions) => runOf(positions) ?? []);
	if (runs.length === summed.length) return runSums({ matrix, tipCount: count, runs });
	const species = new Int32Array(count);
	return (batch) => {
		const sums = new Float64Array(batch.count * summed.length);
		for (let drawn = 0; drawn < batch.count; drawn++) {
			for (const [which, positions] of summed.entries()) {
				for (let i = 0; i < positions.length; i++) species[i] = batch.arrangements[drawn * count + (positions[i] ?? 0)] ?? 0;
				sums[drawn * summed.length + which] = pairSum(matrix, count, { species, size: positions.length });
			}
		}
		return sums;
	};
}

function smallerSide(members: Int32Array, count: number): Side {
	const run = runOf(members);
	const isAtEnd = run !== null && (run.from === 0 || run.to === count);
	if (!isAtEnd || 2 * members.length < count) return { positions: members, isRest: false };
	const restFrom = run.from === 0 ? run.to : 0;
	return { positions: Int32Array.from({ length: count - members.length }, (_, i) => restFrom + i), isRest: true };
}

/** Over the first `size` species. Four partial sums, so that an addition need not wait for the one before. */
function pairSum(matrix: Float64Array, count: number, { species, size }: { species: Int32Array; size: number }): number {
	let [first, second, third, fourth] = [0, 0, 0, 0];
	for (let i = 1; i < size; i++) {
		const start = (species[i] ?? 0) * count;
		let j = 0;
		for (; j + 3 < i; j += 4) {
			first += matrix[start + (species[j] ?? 0)] ?? 0;
			second += matrix[start + (species[j + 1] ?? 0)] ?? 0;
			third += matrix[start + (species[j + 2] ?? 0)] ?? 0;
			fourth += matrix[start + (species[j + 3] ?? 0)] ?? 0;
		}
		for (; j < i; j++) first += matrix[start + (species[j] ?? 0)] ?? 0;
	}
	return first + second + (third + fourth);
}
