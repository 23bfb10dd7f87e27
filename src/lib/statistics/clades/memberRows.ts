import type { ShuffleBatch } from '../shuffleBatches.ts';
import type { SpeciesGroup } from './cladeList.ts';

/** Sums of the rows of a symmetric matrix without its diagonal. */
export function rowSums(matrix: Float64Array, count: number): Float64Array {
	return Float64Array.from({ length: count }, (_, row) => {
		let sum = 0;
		for (let column = 0; column < count; column++) if (column !== row) sum += matrix[row * count + column] ?? 0;
		return sum;
	});
}

/**
 * Row sums of the members of each group, for every arrangement of a batch: of neighbours from running totals, of others
 * one by one.
 *
 * @param rows - shape (n,)
 * @returns shape (arrangements, groups), row-major
 */
export function memberRows(groups: readonly SpeciesGroup[], rows: Float64Array): (batch: ShuffleBatch) => Float64Array {
	const count = rows.length;
	const running = new Float64Array(count + 1);
	const runs = groups.map(({ members }) => runOf(members));
	const from = Int32Array.from(runs, (run) => run?.from ?? 0);
	const to = Int32Array.from(runs, (run) => run?.to ?? 0);
	const scattered = groups.flatMap(({ members }, g) => (runs[g] === null ? [{ g, members }] : []));
	return (batch) => {
		const sums = new Float64Array(batch.count * groups.length);
		for (let drawn = 0; drawn < batch.count; drawn++) {
			const start = drawn * count;
			const into = drawn * groups.length;
			for (let i = 0; i < count; i++) {
				running[i + 1] = (running[i] ?? 0) + (rows[batch.arrangements[start + i] ?? 0] ?? 0);
			}
			for (let g = 0; g < from.length; g++) sums[into + g] = (running[to[g] ?? 0] ?? 0) - (running[from[g] ?? 0] ?? 0);
			for (const { g, members } of scattered) {
				sums[into + g] = members.reduce((sum, position) => sum + (rows[batch.arrangements[start + position] ?? 0] ?? 0), 0);
			}
		}
		return sums;
	};
}

/** The half-open range of neighbouring positions, or null when there are gaps. */
export function runOf(members: Int32Array): { readonly from: number; readonly to: number } | null {
	const from = members[0] ?? 0;
	const to = from + members.length;
	return members.at(-1) === to - 1 ? { from, to } : null;
}
