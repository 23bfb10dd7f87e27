import { InputError } from '#lib/remarks/inputError.ts';
import { type NodeSumsInput, nodeSumsOfBatch } from '../nodeSums.ts';
import { quantiles } from '../quantiles.ts';
import { identityArrangement } from '../arrangements.ts';
import { type ShuffleBatch, shuffleBatches, type ShuffleQuestion } from '../shuffleBatches.ts';

/** Nodes of neighbouring ages, and the pairs that meet there. */
export type AgeClass = {
	/** ages of the youngest and the oldest node */
	readonly from: number;
	readonly to: number;
	readonly nodes: number;
	readonly pairs: number;
	readonly mean: number;
	/** 2.5 %, 50 % and 97.5 % of the class's mean over shuffled species, pointwise */
	readonly shuffled: readonly [number, number, number];
};

const FEWEST_CLASSES = 3;
const MOST_CLASSES = 8;
const BAND = [0.025, 0.5, 0.975] as const;
/** Quantiles of so many shuffles err by about 2 % of the spread; more would only cost time. */
const MOST_SHUFFLES = 1999;
const FEWEST_SHUFFLES = 199;
/** Pair visits of a band: about a tenth of a second. */
const VISITS = 5e7;

/**
 * Sorts nodes by age into about √nodes classes, 3 to 8, of equal numbers of nodes. Nodes of one age are never parted, so
 * a tree with many equal ages has fewer classes.
 *
 * @returns slots of each class, youngest class first
 */
export function classesByAge(ages: Float64Array): number[][] {
	const order = Array.from(ages.keys()).sort((a, b) => (ages[a] ?? 0) - (ages[b] ?? 0));
	const wanted = Math.min(order.length, MOST_CLASSES, Math.max(FEWEST_CLASSES, Math.round(Math.sqrt(order.length))));
	const classes: number[][] = [];
	let open: number[] = [];
	for (const [place, slot] of order.entries()) {
		open.push(slot);
		const next = order[place + 1];
		const isFull = place + 1 >= Math.round(((classes.length + 1) * order.length) / wanted);
		if (next === undefined || (isFull && (ages[next] ?? 0) > (ages[slot] ?? 0))) {
			classes.push(open);
			open = [];
		}
	}
	return classes;
}

/**
 * Mean overlap by age of the common ancestor, and where it would lie were the species shuffled over the tips. The bands
 * are pointwise and describe: no class is tested, and a mean outside its band is not evidence by itself.
 *
 * @param ages - shape (slots,), of the nodes of `input`'s layout
 * @param question - the free question of the test; its first shuffles are read, or all arrangements when they are few
 * @throws {InputError} `non-finite` when an age is not a number
 */
export function ageClasses(input: NodeSumsInput, ages: Float64Array, question: ShuffleQuestion): AgeClass[] {
	if (!ages.every(Number.isFinite)) throw new InputError('non-finite', 'Expected every node age to be a finite number.');
	const { pairs } = input.layout;
	const classes = classesByAge(ages);
	const pairsIn = classes.map((slots) => slots.reduce((sum, slot) => sum + (pairs[slot] ?? 0), 0));
	const meansOf = (batch: Pick<ShuffleBatch, 'count' | 'arrangements'>): number[][] => {
		const { plain } = nodeSumsOfBatch(input, batch);
		return classes.map((slots, place) =>
			Array.from({ length: batch.count }, (_, i) => {
				const from = i * pairs.length;
				return slots.reduce((sum, slot) => sum + (plain[from + slot] ?? 0), 0) / (pairsIn[place] ?? 1);
			})
		);
	};

	const observed = meansOf({ count: 1, arrangements: identityArrangement(input.tipCount) });
	const permutations = Math.min(question.permutations, bandShuffles(input.tipCount));
	const batches = Array.from(shuffleBatches({ ...question, permutations }), meansOf);
	return classes.map((slots, i) => ({
		from: ages[slots[0] ?? 0] ?? 0,
		to: ages[slots.at(-1) ?? 0] ?? 0,
		nodes: slots.length,
		pairs: pairsIn[i] ?? 0,
		mean: observed[i]?.[0] ?? 0,
		shuffled: bandOf(batches.flatMap((means) => means[i] ?? []))
	}));
}

/** Shuffles that the bands of so many species are read from. */
export function bandShuffles(species: number): number {
	const pairs = (species * (species - 1)) / 2;
	return Math.max(FEWEST_SHUFFLES, Math.min(MOST_SHUFFLES, Math.floor(VISITS / pairs)));
}

function bandOf(values: readonly number[]): [number, number, number] {
	const [low, middle, high] = quantiles(Float64Array.from(values), BAND).map(([, value]) => value);
	return [low ?? 0, middle ?? 0, high ?? 0];
}
