import type { Clade } from './clade.ts';
import { roundTo } from './grid.ts';
import type { RandomNumbers } from './randomNumbers.ts';

/** A niche on the two standardised climates, temperature first: where the response is highest, and its standard deviations. */
export type Niche = {
	readonly species: string;
	readonly centre: readonly [number, number];
	readonly width: readonly [number, number];
};

const DECIMALS = 6; // niches are rounded as they are drawn, so that truth.json holds the very numbers used

export type WidthPlan = {
	/** median standard deviation of the response, in standard deviations of the climate over the land */
	readonly medianWidth: number;
	/** standard deviation of the logarithm of the widths */
	readonly widthLogSd: number;
};

/** Centres that walk at random along the branches, each climate on its own: relatives that parted late sit close together. */
export function inheritedNiches(tree: Clade, variancePerMyr: number, widths: WidthPlan, random: RandomNumbers): Niche[] {
	const walk = (clade: Clade, centre: readonly [number, number]): Niche[] => {
		if (clade.daughters.length === 0) {
			const [temperature, rainfall] = centre;
			return [{ species: clade.name, centre: rounded(temperature, rainfall), width: drawWidth(widths, random) }];
		}
		return clade.daughters.flatMap((daughter) => {
			const step = Math.sqrt(variancePerMyr * (clade.ageMa - daughter.ageMa));
			return walk(daughter, [centre[0] + step * random.normal(), centre[1] + step * random.normal()]);
		});
	};
	return walk(tree, [0, 0]);
}

/** Centres drawn for each species on its own: the tree has no say. */
export function independentNiches(
	species: readonly string[],
	centreSd: number,
	widths: WidthPlan,
	random: RandomNumbers
): Niche[] {
	return species.map((name) => ({
		species: name,
		centre: rounded(centreSd * random.normal(), centreSd * random.normal()),
		width: drawWidth(widths, random)
	}));
}

function drawWidth({ medianWidth, widthLogSd }: WidthPlan, random: RandomNumbers): [number, number] {
	const draw = (): number => medianWidth * Math.exp(widthLogSd * random.normal());
	return rounded(draw(), draw());
}

function rounded(temperature: number, rainfall: number): [number, number] {
	return [roundTo(temperature, DECIMALS), roundTo(rainfall, DECIMALS)];
}
