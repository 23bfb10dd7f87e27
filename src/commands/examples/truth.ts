import { landCells, roundTo } from './grid.ts';
import { LANTERNFROG_COLLECTING, LANTERNFROG_DATING, LANTERNFROG_SEED, LANTERNFROG_TREE } from './lanternfrogs.ts';
import { LANTERNFROG_VARIANCE_PER_MYR, LANTERNFROG_WIDTHS } from './lanternfrogs.ts';
import {
	MOSS_BEETLE_CENTRE_SD,
	MOSS_BEETLE_COLLECTING,
	MOSS_BEETLE_SEED,
	MOSS_BEETLE_TREE,
	MOSS_BEETLE_WIDTHS
} from './mossBeetles.ts';
import { expectedOverlap } from './expectedOverlap.ts';
import type { Study } from './study.ts';
import type { ClimateScale } from './suitability.ts';
import { CLIMATE, MERROW_FRAME, TERRAIN_SEED, type Terrain } from './terrain.ts';

const INVENTED = { invented: true, licence: 'CC0-1.0', madeBy: 'npm run examples' } as const;
const DECIMALS = 6;

/** What the lanternfrogs were made from, as the text of truth.json. */
export function lanternfrogTruth(study: Study, terrain: Terrain): string {
	const { names: _names, ...treePlan } = LANTERNFROG_TREE;
	return asText({
		...INVENTED,
		study: 'Lanternfrogs of the Merrow Range',
		seed: LANTERNFROG_SEED,
		seedNote:
			'Chosen so that the example shows something: of the seeds 1 to 750 one in which D falls with age, neither by a hair nor spectacularly, and still does within the deepest split. Most seeds show a steeper fall; p here is no evidence of anything.',
		tree: { model: 'birth-death, forward, conditioned on the number of living species and the age of the root', ...treePlan },
		dating: { model: 'log-normal stretch of the whole tree and of each node, cut off at the parent', ...LANTERNFROG_DATING },
		niches: {
			model: 'Brownian motion of the centres, independent log-normal widths',
			variancePerMyr: LANTERNFROG_VARIANCE_PER_MYR,
			...LANTERNFROG_WIDTHS
		},
		expected: {
			note: 'Mean over many such clades, every species of the median width and every climate equally common. The maps depart from it: widths differ, and the land has more of some climates than of others.',
			byAge: [1, 2, 5, 10, LANTERNFROG_TREE.rootAgeMa].map((ageMa) =>
				rounded(expectedOverlap(ageMa, LANTERNFROG_VARIANCE_PER_MYR, LANTERNFROG_WIDTHS.medianWidth))
			)
		},
		...landTruth(study, terrain),
		records: LANTERNFROG_COLLECTING,
		species: speciesTruth(study)
	});
}

/** What the moss beetles were made from, as the text of truth.json. */
export function mossBeetleTruth(study: Study, terrain: Terrain): string {
	const { names: _names, ...treePlan } = MOSS_BEETLE_TREE;
	return asText({
		...INVENTED,
		study: 'Moss beetles of the Merrow Range',
		seed: MOSS_BEETLE_SEED,
		seedNote:
			'Chosen so that the example shows what nothing looks like: of the seeds 1 to 150 one whose p is in the middle in both tails, freely and within the deepest split. The tree had no say in the niches of any of them.',
		tree: { model: 'birth-death, forward, conditioned on the number of living species and the age of the root', ...treePlan },
		niches: {
			model: 'independent normal centres, independent log-normal widths',
			centreSd: MOSS_BEETLE_CENTRE_SD,
			...MOSS_BEETLE_WIDTHS
		},
		...landTruth(study, terrain),
		records: MOSS_BEETLE_COLLECTING,
		species: speciesTruth(study)
	});
}

function landTruth(study: Study, terrain: Terrain): object {
	return {
		terrain: { seed: TERRAIN_SEED, ...MERROW_FRAME, landCells: landCells(terrain.elevationM).length, climate: CLIMATE },
		standardisation: {
			note: 'Centres and widths are in standard deviations of the climate over the land cells, each cell counting once.',
			temperatureC: study.scales.temperatureC,
			rainfallMm: study.scales.rainfallMm
		}
	};
}

function speciesTruth(study: Study): object[] {
	return study.accounts.map(({ niche, collection }) => ({
		species: niche.species,
		centre: { temperature: niche.centre[0], rainfall: niche.centre[1] },
		width: { temperature: niche.width[0], rainfall: niche.width[1] },
		optimum: {
			temperatureC: unscaled(niche.centre[0], study.scales.temperatureC),
			rainfallMm: unscaled(niche.centre[1], study.scales.rainfallMm)
		},
		reach: collection.reach,
		records: collection.occurrences.length
	}));
}

function unscaled(value: number, scale: ClimateScale): number {
	return roundTo(scale.mean + value * scale.sd, 2);
}

function rounded<Key extends string>(numbers: Readonly<Record<Key, number>>): Record<string, number> {
	return Object.fromEntries(Object.entries<number>(numbers).map(([key, value]) => [key, roundTo(value, DECIMALS)]));
}

function asText(truth: object): string {
	return `${JSON.stringify(truth, null, '\t')}\n`;
}
