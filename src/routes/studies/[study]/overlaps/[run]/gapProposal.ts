import { fewestToLeaveOut } from '#lib/overlap/fewestToLeaveOut.ts';
import { selectSpecies, type PairMatrix } from '#lib/overlap/pairMatrix.ts';

export type GapProposal = {
	/** pairs without a value among the species in use */
	readonly missing: number;
	readonly leaveOut: readonly string[];
	/** no smaller choice exists */
	readonly isFewest: boolean;
	readonly remaining: number;
};

/**
 * The fewest species to leave out so that a test has every pair; null when none is missing among those in use.
 * @param inUse - names of the matrix
 */
export function gapProposal(matrix: PairMatrix, inUse: readonly string[]): GapProposal | null {
	const used = selectSpecies(matrix, inUse);
	let empty = 0;
	for (const value of used.values) if (Number.isNaN(value)) empty += 1;
	if (empty === 0) return null;
	const { species, exact } = fewestToLeaveOut(used);
	return { missing: empty / 2, leaveOut: species, isFewest: exact, remaining: inUse.length - species.length };
}
