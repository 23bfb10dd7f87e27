import type { StoredNicheVariable } from '#lib/contracts/nicheTables.ts';
import type { NicheTable, NicheVariable } from '#lib/overlap/nicheTable.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import type { nicheTables } from '#lib/server/db/schema.ts';

export type KeptNicheTable = Pick<NicheTable, 'species' | 'variables'> & {
	readonly id: string;
	readonly studyId: string;
	readonly label: string;
	/** the text as given */
	readonly textHash: string;
	readonly remarks: readonly Remark[];
	readonly replaces: string | null;
	readonly createdBy: string;
	readonly createdAt: string;
	readonly deletedAt: string | null;
};

export function nicheTableFromRow({ variables, createdAt, deletedAt, ...rest }: typeof nicheTables.$inferSelect): KeptNicheTable {
	return {
		...rest,
		variables: variables.map(variableFromStored),
		createdAt: createdAt.toISOString(),
		deletedAt: deletedAt?.toISOString() ?? null
	};
}

export function storedVariable({ name, role, values, standardErrors }: NicheVariable): StoredNicheVariable {
	return {
		name,
		role,
		values: nullsForGaps(values),
		standardErrors: standardErrors === null ? null : nullsForGaps(standardErrors)
	};
}

function variableFromStored({ name, role, values, standardErrors }: StoredNicheVariable): NicheVariable {
	return {
		name,
		role,
		values: gapsForNulls(values),
		standardErrors: standardErrors === null ? null : gapsForNulls(standardErrors)
	};
}

function nullsForGaps(values: Float64Array): (number | null)[] {
	return Array.from(values, (value) => (Number.isNaN(value) ? null : value));
}

function gapsForNulls(values: readonly (number | null)[]): Float64Array {
	return Float64Array.from(values, (value) => value ?? Number.NaN);
}
