import { identityArrangement } from '../arrangements.ts';
import type { SharedNull } from '../multiplicity/minimumP.ts';
import { plannedArrangements, type ShuffleBatch, shuffleBatches } from '../shuffleBatches.ts';
import type { SpeciesGroup } from './cladeList.ts';
import { memberRows, rowSums } from './memberRows.ts';
import type { WithinSums } from './withinSums.ts';

/** Share of the mean magnitudes within which two differences are one: far above rounding, far below a step of real data. */
const TIE_SHARE = 1e-10;

/** Groups of species that change places freely among themselves and the others. */
export type ContrastQuestion = {
	/** shape (n, n), row-major, symmetric */
	readonly matrix: Float64Array;
	readonly count: number;
	readonly groups: readonly SpeciesGroup[];
	/** how the pairs inside the groups of a matrix are summed */
	readonly withinSums: (matrix: Float64Array) => WithinSums;
	/** see `STREAM_DOMAIN` */
	readonly domain: number;
	readonly seed: number;
	readonly permutations: number;
	/** called before every batch; it may throw to stop */
	readonly onBatch?: () => void;
};

export type ContrastNulls = { readonly exact: boolean; readonly count: number; readonly nulls: readonly SharedNull[] };

/**
 * The difference within - between of each group, observed and for every arrangement of one stream. All groups see the
 * same arrangements. Between needs no pairs of its own: it is the row sums of the members, less twice the sum within.
 * Memory: groups × arrangements doubles.
 */
export function contrastNulls(question: ContrastQuestion): ContrastNulls {
	const { matrix, count, groups, onBatch, domain, seed, permutations } = question;
	const shuffled = { tipCount: count, groups: [{ from: 0, to: count }], domain, seed, permutations };
	const planned = plannedArrangements(shuffled);
	const values = groups.map(() => new Float64Array(planned.count));
	const sums = contrastSums(question, matrix);
	for (const batch of shuffleBatches(shuffled)) {
		onBatch?.();
		const { within, rows } = sums(batch);
		for (const [g, into] of values.entries()) {
			const { ofWithin, ofRows } = contrastWeights(groups[g], count);
			for (let drawn = 0, at = g; drawn < batch.count; drawn++, at += groups.length) {
				into[batch.first + drawn] = ofWithin * (within[at] ?? 0) + ofRows * (rows[at] ?? 0);
			}
		}
	}
	const ties = tiesOf(question);
	const observed = observedOf(question);
	const nulls = groups.map((_, g) => ({
		observed: observed[g] ?? 0,
		values: values[g] ?? new Float64Array(0),
		tie: ties[g] ?? 0
	}));
	return { ...planned, nulls };
}

type Sums = { readonly within: Float64Array; readonly rows: Float64Array };

function contrastSums({ groups, count, withinSums }: ContrastQuestion, matrix: Float64Array): (batch: ShuffleBatch) => Sums {
	const within = withinSums(matrix);
	const rows = memberRows(groups, rowSums(matrix, count));
	return (batch) => ({ within: within(batch), rows: rows(batch) });
}

/** The observed differences, by the same sums as every shuffle, so that the identity ties with itself. */
function observedOf(question: ContrastQuestion): number[] {
	const { within, rows } = contrastSums(question, question.matrix)(identityBatch(question.count));
	return question.groups.map((group, g) => {
		const { ofWithin, ofRows } = contrastWeights(group, question.count);
		return ofWithin * (within[g] ?? 0) + ofRows * (rows[g] ?? 0);
	});
}

function tiesOf(question: ContrastQuestion): number[] {
	const { within, rows } = contrastSums(question, question.matrix.map(Math.abs))(identityBatch(question.count));
	return question.groups.map((group, g) => {
		const { ofWithin, ofRows } = contrastWeights(group, question.count);
		return TIE_SHARE * (ofWithin * (within[g] ?? 0) - ofRows * (rows[g] ?? 0));
	});
}

function identityBatch(count: number): ShuffleBatch {
	return { first: 0, count: 1, arrangements: identityArrangement(count) };
}

/** Mean within less mean between as weights of the sum within and of the members' row sums, rows = between + 2 within. */
function contrastWeights(group: SpeciesGroup | undefined, count: number): { ofWithin: number; ofRows: number } {
	const size = group?.members.length ?? 0;
	const between = size * (count - size);
	return { ofWithin: 2 / (size * (size - 1)) + 2 / between, ofRows: -1 / between };
}
