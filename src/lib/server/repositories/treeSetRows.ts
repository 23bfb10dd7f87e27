import type { AgeUnit, TreeSetKind } from '#lib/contracts/materials.ts';
import type { TreeAbout } from '#lib/contracts/treeAbout.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import type { treeSets } from '#lib/server/db/schema.ts';

export type TreeSet = {
	readonly id: string;
	readonly studyId: string;
	readonly label: string;
	readonly textHash: string;
	readonly ageUnit: AgeUnit;
	readonly kind: TreeSetKind;
	/** trees that are used: after burn-in and thinning */
	readonly treeCount: number;
	/** of the first tree that is used, and so are the facts below */
	readonly tipCount: number;
	readonly tips: readonly string[];
	/** relative spread of root-to-tip distances; null with missing lengths */
	readonly ultrametricSpread: number | null;
	readonly polytomies: number;
	/** unit of `ageUnit`; null with missing lengths */
	readonly rootAge: number | null;
	readonly remarks: readonly Remark[];
	readonly spreadConfirmed: boolean;
	readonly chosen: ChosenTrees;
	/** what only its author knows; null when nobody has said anything */
	readonly about: TreeAbout | null;
	readonly replaces: string | null;
	readonly createdBy: string;
	readonly createdAt: string;
	readonly deletedAt: string | null;
};

/** Which trees of a text are used: from `burnIn` on, every `thin`-th. */
export type ChosenTrees = { readonly burnIn: number; readonly thin: number };

/** The place in the text of the tree that the set counts as `tree`. */
export function treeInText({ burnIn, thin }: ChosenTrees, tree: number): number {
	return burnIn + tree * thin;
}

type Row = typeof treeSets.$inferSelect;
/** The column also keeps the choice of trees; a set of all trees has none. */
export type Summary = Row['summary'] & Partial<ChosenTrees>;

export function treeSetFromRow(row: Row): TreeSet {
	const { summary, createdAt, deletedAt, ...rest } = row;
	const { burnIn = 0, thin = 1, ...facts }: Summary = summary;
	return {
		...rest,
		...facts,
		chosen: { burnIn, thin },
		createdAt: createdAt.toISOString(),
		deletedAt: deletedAt?.toISOString() ?? null
	};
}
