import { identityArrangement } from '../arrangements.ts';
import type { SharedNull } from '../multiplicity/minimumP.ts';
import { plannedArrangements, type ShuffleBatch, shuffleBatches } from '../shuffleBatches.ts';
import type { SpeciesGroup } from './cladeList.ts';
import { rowSums } from './directSums.ts';
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
	const write = contrastWriter(question, matrix);
	for (const batch of shuffleBatches(shuffled)) {
		onBatch?.();
		write(batch, values, batch.first);
	}
	const [observed, magnitudes] = [matrix, matrix.map(Math.abs)].map((each) => observedContrasts(question, each));
	const nulls = groups.map((_, g) => ({
		observed: observed?.[g]?.difference ?? Number.NaN,
		values: values[g] ?? new Float64Array(0),
		tie: TIE_SHARE * (magnitudes?.[g]?.total ?? 0)
	}));
	return { ...planned, nulls };
}

type Contrast = { readonly difference: number; readonly total: number };

/** By the same sums as every shuffle, so that the identity ties with itself. */
function observedContrasts(question: ContrastQuestion, matrix: Float64Array): Contrast[] {
	const { count, groups } = question;
	const batch: ShuffleBatch = { first: 0, count: 1, arrangements: identityArrangement(count) };
	const within = question.withinSums(matrix)(batch);
	const rows = memberRows(groups, batch.arrangements, rowSums(matrix, count));
	return groups.map((group, g) => contrast(group, count, { within: within[g] ?? 0, rows: rows[g] ?? 0 }));
}

type Writer = (batch: ShuffleBatch, values: readonly Float64Array[], first: number) => void;

function contrastWriter({ count, groups, withinSums }: ContrastQuestion, matrix: Float64Array): Writer {
	const sums = withinSums(matrix);
	const rows = rowSums(matrix, count);
	return (batch, values, first) => {
		const within = sums(batch);
		for (let drawn = 0; drawn < batch.count; drawn++) {
			const arrangement = batch.arrangements.subarray(drawn * count, (drawn + 1) * count);
			const ofMembers = memberRows(groups, arrangement, rows);
			for (const [g, group] of groups.entries()) {
				const sum = { within: within[drawn * groups.length + g] ?? 0, rows: ofMembers[g] ?? 0 };
				const into = values[g];
				if (into) into[first + drawn] = contrast(group, count, sum).difference;
			}
		}
	};
}

function contrast({ members }: SpeciesGroup, count: number, { within, rows }: { within: number; rows: number }): Contrast {
	const meanWithin = within / ((members.length * (members.length - 1)) / 2);
	const meanBetween = (rows - 2 * within) / (members.length * (count - members.length));
	return { difference: meanWithin - meanBetween, total: meanWithin + meanBetween };
}

/** Row sums of the members of each group: of neighbours from running totals, of others one by one. */
function memberRows(groups: readonly SpeciesGroup[], arrangement: Int32Array, rows: Float64Array): Float64Array {
	const running = new Float64Array(arrangement.length + 1);
	for (let i = 0; i < arrangement.length; i++) running[i + 1] = (running[i] ?? 0) + (rows[arrangement[i] ?? 0] ?? 0);
	return Float64Array.from(groups, ({ members }) => {
		const from = members[0] ?? 0;
		const to = from + members.length;
		if (members.at(-1) === to - 1) return (running[to] ?? 0) - (running[from] ?? 0);
		return members.reduce((sum, position) => sum + (rows[arrangement[position] ?? 0] ?? 0), 0);
	});
}
