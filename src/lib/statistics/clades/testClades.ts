import { type AgedTree, treeShape } from '../agedTree.ts';
import { minimumP } from '../multiplicity/minimumP.ts';
import { STREAM_DOMAIN } from '../randomStream.ts';
import { assertOverlap } from '../assertOverlap.ts';
import { type BeyondParent, beyondParent } from './beyondParent.ts';
import { type CladeContrast, cladeContrast } from './cladeContrast.ts';
import type { SpeciesGroup } from './cladeList.ts';
import { type ContrastNulls, contrastNulls } from './contrastNulls.ts';
import { directWithinSums } from './directSums.ts';
import { smallestMembershipP } from './memberships.ts';
import { cladeWithinSums } from './withinSums.ts';

/** Differences kept at once: 160 MB, which lets the 1,998 clades of 2,000 species have 9,999 shuffles. */
const MOST_VALUES = 20_000_000;

export type CladeQuestion = {
	readonly tree: AgedTree;
	/** shape (n, n), row-major, tips in tree order; a similarity */
	readonly overlap: Float64Array;
	/** at least one; each of 2 to n - 1 species */
	readonly groups: readonly SpeciesGroup[];
	/** whole number in [0, 2^32) */
	readonly seed: number;
	/** m, at least 1 */
	readonly permutations: number;
	/** level in (0, 1) of the family of all groups */
	readonly alpha: number;
	/** called before every batch of shuffles; it may throw to stop */
	readonly onBatch?: () => void;
};

export type TestedClade = {
	readonly group: SpeciesGroup;
	readonly contrast: CladeContrast;
	/** of the difference, upper tail: more alike inside than with the others */
	readonly p: number;
	/** for the number of groups, by the step-down minimum p under the shuffles that all of them share */
	readonly pAdjusted: number;
	/** whatever the data: 1 / C(n, size), and no less than 1 / (m + 1) when drawn */
	readonly smallestP: number;
	/** the adjusted p it would have at `smallestP` */
	readonly smallestAdjustedP: number;
	/** null for a group that is no clade of the tree */
	readonly beyond: BeyondParent | null;
	/** both adjusted p-values are within the level */
	readonly holds: boolean;
};

export type CladeTest = {
	readonly exact: boolean;
	/** n! when exact, else shuffles: those asked for, fewer where groups times shuffles pass 20 million */
	readonly count: number;
	readonly clades: readonly TestedClade[];
};

/**
 * Tests which groups of species are more alike among themselves than with all others. Adjusted p-values hold under the
 * global null (no species differs from another); a clade inside an alike clade passes for its parent's sake, so a claim
 * about a clade asks `beyond` as well.
 *
 * Cost: one pass over all pairs per shuffle for all clades together, and for each parent half the square of the smaller
 * side of its split; a declared group that is no clade costs half the square of its size.
 *
 * @throws {InputError} `non-finite`, `asymmetric`
 */
export function testClades(question: CladeQuestion): CladeTest {
	const { tree, overlap, groups, alpha } = question;
	const shape = treeShape(tree);
	const count = shape.tips.length;
	assertOverlap(overlap, count);
	const permutations = Math.min(question.permutations, Math.floor(MOST_VALUES / Math.max(1, groups.length)));
	const areClades = groups.every(({ node }) => node !== null);
	const free = contrastNulls({
		...question,
		matrix: overlap,
		count,
		permutations,
		withinSums: (matrix) => (areClades ? cladeWithinSums(shape, groups, matrix) : directWithinSums(groups, count, matrix)),
		domain: STREAM_DOMAIN.free
	});
	const judged = minimumP(free.nulls, { tail: 'greater', exact: free.exact });
	const inTree = groups.flatMap((group, g) => (group.node === null ? [] : { group, freeNull: free.nulls[g] }));
	const beyond = beyondParent({
		...question,
		shape,
		parentOf: tree.parent,
		clades: inTree.map(({ group }) => group),
		free: { exact: free.exact, nulls: inTree.flatMap(({ freeNull }) => freeNull ?? []) },
		permutations
	});
	const byNode = new Map(beyond.map((found) => [found.node, found]));
	const clades = groups.map((group, g): TestedClade => {
		const { p = 1, pStepDown: pAdjusted = 1 } = judged.adjusted[g] ?? {};
		const smallestP = Math.max(smallestMembershipP(count, group.members.length), leastP(free));
		const found = byNode.get(group.node ?? -1) ?? null;
		return {
			group,
			contrast: cladeContrast(overlap, count, group.members),
			p,
			pAdjusted,
			smallestP,
			smallestAdjustedP: reachable(judged.minima, smallestP),
			beyond: found,
			holds: pAdjusted <= alpha && found !== null && found.pAdjusted !== null && found.pAdjusted <= alpha
		};
	});
	return { exact: free.exact, count: free.count, clades };
}

/** No Monte Carlo p is smaller. */
function leastP({ exact, count }: Pick<ContrastNulls, 'exact' | 'count'>): number {
	return exact ? 0 : 1 / (count + 1);
}

/** The adjusted p of a group that had the smallest p it can have. */
function reachable(minima: Float64Array, smallestP: number): number {
	const bound = smallestP * (1 + Number.EPSILON * 8);
	let asSmall = 0;
	while (asSmall < minima.length && (minima[asSmall] ?? 0) <= bound) asSmall++;
	return Math.max(smallestP, asSmall / minima.length);
}
