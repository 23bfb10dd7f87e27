import { MEASURE_NAMES } from '#lib/contracts/measure.ts';
import type { Access } from '#lib/server/access.ts';
import * as names from '#lib/server/repositories/names.ts';
import * as openings from '#lib/server/repositories/openings.ts';
import type { OverlapRun } from '#lib/server/repositories/overlapRunRows.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { tinyWing } from '../tinyWing.ts';
import { overlapFigures } from './overlapFigures.ts';

const FOLDED = { rows: 0, lower: [] };

/** The overlap runs of a study, newest first, each as a small wing in tree order with its figures. */
export async function overlapsPage(access: Access) {
	const tips = (await treeSets.list(access))[0]?.tips ?? [];
	const listed = await overlapRuns.list(access);
	const drawable = await openings.drawable(access, listed);
	const lines = [];
	for (const { id } of listed) {
		const run = await overlapRuns.find(access, id);
		if (run !== null) lines.push(await runLine(access, run, { tips, isFolded: !drawable.has(id) }));
	}
	return { runs: lines };
}

type Shown = {
	readonly tips: readonly string[];
	/** nobody has looked yet, so the values are kept back */ readonly isFolded: boolean;
};

async function runLine(access: Access, run: OverlapRun, { tips, isFolded }: Shown) {
	const { id, label, measure, createdAt, species, lower, remarks } = run;
	const pairs = tips.length === 0 ? [] : ((await names.matching(access, { overlapRun: id }))?.pairs ?? []);
	const nameOf = new Map(pairs.map((pair) => [pair.tip, pair.species]));
	const order = tips.map((tip) => nameOf.get(tip) ?? tip);
	return {
		...{ id, label, at: createdAt, measure: measure === 'other' ? 'another measure' : MEASURE_NAMES[measure] },
		figures: isFolded ? { ...overlapFigures(species.length, lower), spread: null } : overlapFigures(species.length, lower),
		openCount: remarks.filter(({ level }) => level === 'settle').length,
		isFolded,
		wing: isFolded ? FOLDED : tinyWing(run, order)
	};
}
