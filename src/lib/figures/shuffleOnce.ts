import type { PlateData } from '#lib/contracts/analysisResult.ts';
import { drawFrom } from './drawFrom.ts';
import { pairPlace, plateModel, type PlateInput } from './plateModel.ts';

export type Deal = {
	/** shape (tips,); which species, by its own row, now stands on each tip */
	readonly dealt: readonly number[];
	/** slope of all pairs after the deal; overlap per unit of age */
	readonly slope: number;
};

/**
 * Deals the species onto other tips once and returns the slope that this gives: what a shuffle of the test does, shown
 * one at a time. The same seed and step always deal alike. These deals are for looking; the test has its own stream.
 */
export function shuffleOnce(input: PlateInput, seed: number, step: number): Deal {
	const count = input.plate.species.length;
	const draw = drawFrom(seed, step);
	const dealt = Array.from({ length: count }, (_, row) => row);
	for (let last = count - 1; last > 0; last--) {
		const other = Math.floor(draw() * (last + 1));
		[dealt[last], dealt[other]] = [dealt[other] ?? other, dealt[last] ?? last];
	}
	return { dealt, slope: slopeOf(input, dealt) };
}

/** The plate with its species dealt onto other tips; the observed line and everything in e stay as they are. */
export function dealtInput(input: PlateInput, dealt: readonly number[]): PlateInput {
	const { species, overlapLower } = input.plate;
	const plate: PlateData = {
		...input.plate,
		species: dealt.map((row) => species[row] ?? ''),
		overlapLower: dealtOverlaps(overlapLower, dealt)
	};
	// What was found of the real arrangement is not drawn over another.
	const nodeAverages = { ...input.nodeAverages, nodes: [], nested: null, plain: null };
	return { ...input, plate, clades: undefined, nodeAverages };
}

function dealtOverlaps(lower: readonly number[], dealt: readonly number[]): number[] {
	const moved: number[] = [];
	for (let j = 1; j < dealt.length; j++) {
		for (let i = 0; i < j; i++) moved.push(lower[pairPlace(dealt[i] ?? i, dealt[j] ?? j)] ?? 0);
	}
	return moved;
}

/** Least-squares slope of the dealt overlaps on the ages of the tips they stand on. */
function slopeOf(input: PlateInput, dealt: readonly number[]): number {
	const model = plateModel(input);
	const overlaps = dealtOverlaps(input.plate.overlapLower, dealt);
	const ages = Array.from(model.ancestor, (node) => model.age[node] ?? 0);
	const meanAge = ages.reduce((sum, age) => sum + age, 0) / ages.length;
	let [products, squares] = [0, 0];
	for (const [place, age] of ages.entries()) {
		products += (age - meanAge) * (overlaps[place] ?? 0);
		squares += (age - meanAge) ** 2;
	}
	return squares > 0 ? products / squares : 0;
}
