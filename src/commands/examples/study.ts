import { tipNames, type Clade } from './clade.ts';
import type { Grid } from './grid.ts';
import { mapOverlaps, type MapOverlaps } from './mapOverlap.ts';
import type { Niche } from './niches.ts';
import { collect, type CollectingPlan, type Collection } from './occurrences.ts';
import { randomNumbers } from './randomNumbers.ts';
import { climateScales, suitabilityMap, type ClimateScales } from './suitability.ts';
import type { Terrain } from './terrain.ts';

/** One invented species: what is true of it and what was observed. */
type SpeciesAccount = { readonly niche: Niche; readonly map: Grid; readonly collection: Collection };

/** An invented study, complete; accounts and both matrices are in the alphabetical order of `species`. */
export type Study = {
	readonly tree: Clade;
	readonly species: readonly string[];
	readonly accounts: readonly SpeciesAccount[];
	readonly overlaps: MapOverlaps;
	readonly scales: ClimateScales;
};

export type StudyParts = {
	readonly seed: number;
	readonly tree: Clade;
	readonly niches: readonly Niche[];
	readonly terrain: Terrain;
	readonly collecting: CollectingPlan;
};

export function makeStudy({ seed, tree, niches, terrain, collecting }: StudyParts): Study {
	const scales = climateScales(terrain);
	const species = tipNames(tree).sort();
	const accounts = species.map((name) => {
		const niche = niches.find((candidate) => candidate.species === name);
		if (niche === undefined) throw new Error(`The species ${name} has no niche.`);
		const map = suitabilityMap(niche, terrain, scales);
		return { niche, map, collection: collect(map, collecting, randomNumbers(seed, `records of ${name}`)) };
	});
	return { tree, species, accounts, overlaps: mapOverlaps(accounts.map(({ map }) => map)), scales };
}
