import type { Measure } from '#lib/contracts/measure.ts';
import type { PairMatrix } from '#lib/overlap/pairMatrix.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import type { overlapRuns } from '#lib/server/db/schema.ts';

/** A run without its values, which are long: what lists show. */
export type ListedRun = Omit<OverlapRun, 'lower'>;

export type OverlapRun = {
	readonly id: string;
	readonly studyId: string;
	readonly label: string;
	readonly measure: Measure;
	readonly species: readonly string[];
	/** shape (n(n-1)/2,): strict lower triangle, row by row; NaN where a pair is missing */
	readonly lower: Float64Array;
	/** how the text was read: shape, kind, scale, decimal, separator */
	readonly reading: Readonly<Record<string, unknown>>;
	readonly remarks: readonly Remark[];
	/** the text as given; null for a run computed here */
	readonly textHash: string | null;
	readonly replaces: string | null;
	readonly createdBy: string;
	readonly createdAt: string;
	readonly deletedAt: string | null;
};

type Row = typeof overlapRuns.$inferSelect;

export function listedRun({ createdAt, deletedAt, ...rest }: Omit<Row, 'lower'>): ListedRun {
	return { ...rest, createdAt: createdAt.toISOString(), deletedAt: deletedAt?.toISOString() ?? null };
}

export function overlapRunFromRow({ lower, ...rest }: Row): OverlapRun {
	return { ...listedRun(rest), lower: doublesOf(lower) };
}

/** Stored numbers are little-endian whatever the machine. */
export function bytesOf(values: Float64Array): Buffer {
	const bytes = Buffer.alloc(values.length * 8);
	for (let i = 0; i < values.length; i++) bytes.writeDoubleLE(values[i] ?? Number.NaN, i * 8);
	return bytes;
}

export function doublesOf(bytes: Buffer): Float64Array {
	return Float64Array.from({ length: bytes.length / 8 }, (_, i) => bytes.readDoubleLE(i * 8));
}

/** The strict lower triangle of a matrix, row by row: (1,0), (2,0), (2,1), … */
export function lowerOf({ species, values }: PairMatrix): Float64Array {
	const n = species.length;
	const lower = new Float64Array((n * (n - 1)) / 2);
	for (let i = 1, k = 0; i < n; i++) for (let j = 0; j < i; j++) lower[k++] = values[i * n + j] ?? Number.NaN;
	return lower;
}

/** The whole matrix again: similarities, 1 on the diagonal. */
export function matrixOf({ species, lower }: Pick<OverlapRun, 'species' | 'lower'>): PairMatrix {
	const n = species.length;
	const values = new Float64Array(n * n).fill(1);
	for (let i = 1, k = 0; i < n; i++) {
		for (let j = 0; j < i; j++, k++) {
			const value = lower[k] ?? Number.NaN;
			values[i * n + j] = value;
			values[j * n + i] = value;
		}
	}
	return { species, values };
}
