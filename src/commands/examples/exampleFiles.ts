import {
	LANTERNFROG_COLLECTING,
	LANTERNFROG_SEED,
	lanternfrogNiches,
	lanternfrogPosterior,
	lanternfrogTree
} from './lanternfrogs.ts';
import { homeDistances } from './homeDistance.ts';
import { messyFiles, type ExampleFile } from './messyFiles.ts';
import { MOSS_BEETLE_COLLECTING, MOSS_BEETLE_SEED, mossBeetleNiches, mossBeetleTree } from './mossBeetles.ts';
import { README } from './readme.ts';
import { positionText } from './positionText.ts';
import { recordText } from './recordText.ts';
import { makeStudy, type Study } from './study.ts';
import { gridText, squareText } from './tableText.ts';
import { makeTerrain, type Terrain } from './terrain.ts';
import { newickText, nexusText, underscored } from './treeText.ts';
import { lanternfrogTruth, mossBeetleTruth } from './truth.ts';

const SUMMARY_DECIMALS = 6;
const POSTERIOR_DECIMALS = 5;
const DISTANCE_DECIMALS = 1;

/** Every example file with its path under static/examples. Nothing but the seeds goes in: the same bytes on every run. */
export function exampleFiles(): ExampleFile[] {
	const terrain = makeTerrain();
	const frogs = makeLanternfrogs(terrain);
	const beetles = makeMossBeetles(terrain);
	return [
		{ path: 'README.txt', text: README },
		{ path: 'merrow-range/temperature.asc', text: gridText(terrain.temperatureC) },
		{ path: 'merrow-range/rainfall.asc', text: gridText(terrain.rainfallMm) },
		...studyFiles('lanternfrogs', frogs),
		{ path: 'lanternfrogs/posterior-trees.nex', text: posteriorText(frogs) },
		...frogs.accounts.map(({ niche, map }) => ({
			path: `lanternfrogs/maps/${underscored(niche.species)}.asc`,
			text: gridText(map)
		})),
		{ path: 'lanternfrogs/records.csv', text: recordText(frogs, terrain, 'LF') },
		{ path: 'lanternfrogs/positions.csv', text: positionText(frogs, terrain) },
		{ path: 'lanternfrogs/distance-km.csv', text: squareText(frogs.species, distancesOf(frogs), DISTANCE_DECIMALS) },
		{ path: 'lanternfrogs/truth.json', text: lanternfrogTruth(frogs, terrain) },
		...studyFiles('moss-beetles', beetles),
		{ path: 'moss-beetles/records.csv', text: recordText(beetles, terrain, 'MB') },
		{ path: 'moss-beetles/truth.json', text: mossBeetleTruth(beetles, terrain) },
		...messyFiles(frogs)
	];
}

function studyFiles(folder: string, study: Study): ExampleFile[] {
	return [
		{ path: `${folder}/summary-tree.nwk`, text: `${newickText(study.tree, SUMMARY_DECIMALS)}\n` },
		{ path: `${folder}/overlap-d.csv`, text: squareText(study.species, study.overlaps.d) },
		{ path: `${folder}/overlap-i.csv`, text: squareText(study.species, study.overlaps.i) }
	];
}

function posteriorText(frogs: Study): string {
	return nexusText(lanternfrogPosterior(LANTERNFROG_SEED, frogs.tree), POSTERIOR_DECIMALS);
}

function distancesOf(study: Study): number[][] {
	return homeDistances(study.accounts.map(({ collection }) => collection.occurrences));
}

function makeLanternfrogs(terrain: Terrain): Study {
	const tree = lanternfrogTree(LANTERNFROG_SEED);
	const niches = lanternfrogNiches(LANTERNFROG_SEED, tree);
	return makeStudy({ seed: LANTERNFROG_SEED, tree, niches, terrain, collecting: LANTERNFROG_COLLECTING });
}

function makeMossBeetles(terrain: Terrain): Study {
	const tree = mossBeetleTree(MOSS_BEETLE_SEED);
	const niches = mossBeetleNiches(MOSS_BEETLE_SEED, tree);
	return makeStudy({ seed: MOSS_BEETLE_SEED, tree, niches, terrain, collecting: MOSS_BEETLE_COLLECTING });
}
