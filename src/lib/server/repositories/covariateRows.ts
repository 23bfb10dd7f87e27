import type { CovariateReadingNotes } from '#lib/contracts/covariates.ts';
import type { covariates } from '#lib/server/db/schema.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import { doublesOf } from './overlapRunRows.ts';

/** A covariate without its values, which are long: what lists show. */
export type ListedCovariate = Omit<Covariate, 'lower'>;

export type Covariate = {
	readonly id: string;
	readonly studyId: string;
	readonly label: string;
	readonly species: readonly string[];
	/** shape (n(n-1)/2,): strict lower triangle, row by row; NaN where a pair is missing */
	readonly lower: Float64Array;
	readonly reading: CovariateReadingNotes;
	readonly remarks: readonly Remark[];
	/** the text as given */
	readonly textHash: string;
	readonly replaces: string | null;
	readonly createdBy: string;
	readonly createdAt: string;
	readonly deletedAt: string | null;
};

type Row = typeof covariates.$inferSelect;

export function listedCovariate({ createdAt, deletedAt, ...rest }: Omit<Row, 'lower'>): ListedCovariate {
	return { ...rest, createdAt: createdAt.toISOString(), deletedAt: deletedAt?.toISOString() ?? null };
}

export function covariateFromRow({ lower, ...rest }: Row): Covariate {
	return { ...listedCovariate(rest), lower: doublesOf(lower) };
}
