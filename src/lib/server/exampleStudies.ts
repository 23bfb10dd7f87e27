import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { type PlanRequest, planRequestSchema } from '#lib/contracts/plan.ts';
import type { SignedInUser } from '#lib/contracts/user.ts';
import type { Access } from './access.ts';
import { startAnalysis } from './api/startAnalysis.ts';
import { projectRoot } from './folders.ts';
import { watchAnalysis } from './jobs/analysisJobs.ts';
import { can } from './permissions.ts';
import * as analyses from './repositories/analyses.ts';
import * as covariates from './repositories/covariates.ts';
import * as nicheTables from './repositories/nicheTables.ts';
import * as overlapRuns from './repositories/overlapRuns.ts';
import * as studies from './repositories/studies.ts';
import * as treeSets from './repositories/treeSets.ts';

type Example = {
	readonly folder: string;
	readonly title: string;
	readonly question: string;
	/** files in the order they are kept: what comes last is what a plan proposes */
	readonly trees: readonly { readonly file: string; readonly label: string; readonly kind: 'summary' | 'posterior' }[];
	/** what an analysis of its own allows for */
	readonly covariates: readonly { readonly file: string; readonly label: string }[];
	/** a table of niche positions, and those of them that are asked about */
	readonly niches: { readonly file: string; readonly label: string; readonly asked: readonly string[] } | null;
	/** fixed, so that everybody who opens the example reads the same numbers */
	readonly seed: number;
};

const EXAMPLES: readonly Example[] = [
	{
		folder: 'moss-beetles',
		title: 'Moss beetles of the Merrow Range',
		question: 'Have moss beetles that parted recently kept similar niches?',
		trees: [{ file: 'summary-tree.nwk', label: 'summary tree', kind: 'summary' }],
		covariates: [],
		niches: null,
		seed: 20262
	},
	{
		folder: 'lanternfrogs',
		title: 'Lanternfrogs of the Merrow Range',
		question: 'Have lanternfrogs that parted recently kept similar niches?',
		trees: [
			{ file: 'posterior-trees.nex', label: '200 posterior trees', kind: 'posterior' },
			{ file: 'summary-tree.nwk', label: 'summary tree', kind: 'summary' }
		],
		covariates: [{ file: 'distance-km.csv', label: 'distance between ranges, km' }],
		niches: { file: 'positions.csv', label: 'mean climate of the records', asked: ['temperature', 'rainfall'] },
		seed: 20261
	}
];
const RUNS = [
	{ file: 'overlap-i.csv', label: 'Warren’s I, Merrow Range at 2.5′', measure: 'warren-i' },
	{ file: 'overlap-d.csv', label: 'Schoener’s D, Merrow Range at 2.5′', measure: 'schoener-d' }
] as const;

type PlanFields = Pick<PlanRequest, 'treeSet' | 'tree' | 'overlapRun' | 'permutations' | 'seed'> &
	Partial<Pick<PlanRequest, 'covariates' | 'clades' | 'alsoTest' | 'signal'>>;

/** The run of the main job that a start of the demo prints. */
export type MainJob = { readonly study: string; readonly analysis: string; readonly result: AnalysisResult };

/**
 * Keeps the invented studies in a lab, unless it has them, and runs the main job of each once. The main job of the last
 * one, the lanternfrogs, is returned; on a second start it is the stored result.
 */
export async function loadExamples(lead: SignedInUser, lab: string): Promise<MainJob> {
	const kept = await studies.listExamples();
	let last: MainJob | null = null;
	for (const example of EXAMPLES) {
		const study = kept.find(({ title }) => title === example.title)?.id ?? (await keepExample(lead, lab, example));
		last = await runMainJob(await can(lead, 'run', { study }), study, example);
	}
	if (last === null) throw new Error('Expected an example to load.');
	return last;
}

async function keepExample(lead: SignedInUser, lab: string, example: Example): Promise<string> {
	const { id } = await studies.create(await can(lead, 'create', { lab }), {
		title: example.title,
		question: example.question,
		isExample: true
	});
	const access = await can(lead, 'create', { study: id });
	for (const { file, label, kind } of example.trees) {
		await treeSets.create(access, { label, kind, ageUnit: 'Ma', text: await exampleText(example, file) });
	}
	for (const { file, label, measure } of RUNS) {
		await overlapRuns.create(access, { label, measure, csv: await exampleText(example, file) });
	}
	for (const { file, label } of example.covariates) {
		await covariates.create(access, { label, csv: await exampleText(example, file), scale: 'plain' });
	}
	if (example.niches !== null) {
		const { file, label } = example.niches;
		await nicheTables.create(access, { label, csv: await exampleText(example, file) });
	}
	return id;
}

function exampleText({ folder }: Example, file: string): Promise<string> {
	return readFile(join(projectRoot(), 'static', 'examples', folder, file), 'utf8');
}

async function runMainJob(access: Access, study: string, { seed, niches }: Example): Promise<MainJob> {
	const kept = await treeSets.list(access);
	const treeSet = kept.find(({ kind }) => kind === 'summary');
	const runs = await overlapRuns.list(access);
	const overlapRun = runs.find(({ measure }) => measure === 'schoener-d');
	const other = runs.find(({ measure }) => measure === 'warren-i');
	if (treeSet === undefined || overlapRun === undefined)
		throw new Error('Expected the example study to hold a summary tree and its D.');
	const asked = { overlapRun: overlapRun.id, permutations: 99_999, seed };
	const posterior = kept.find(({ kind }) => kind === 'posterior');
	// Before the main job, which stays the newest of the study; on the other matrix, so that the main plan was made unseen.
	if (posterior !== undefined && other !== undefined)
		await runToItsEnd(access, { ...asked, overlapRun: other.id, treeSet: posterior.id, tree: 'all' });
	const allowed = (await covariates.list(access)).map((covariate) => covariate.id);
	const plan = { ...asked, treeSet: treeSet.id, tree: 0 };
	// Everything a plan may ask beside its test. Fewer shuffles: they place p well enough, and a start stays quick.
	if (niches !== null) {
		const beside = { covariates: allowed, clades: { minTips: 3 }, alsoTest: ['nodes-plain', 'slope-log-age'] } as const;
		const further = { ...beside, alsoTest: [...beside.alsoTest], signal: { variables: [...niches.asked] } };
		await runToItsEnd(access, { ...plan, ...further, permutations: 9999 });
	}
	const { id, result } = await runToItsEnd(access, plan);
	return { study, analysis: id, result };
}

async function runToItsEnd(access: Access, plan: PlanFields): Promise<{ readonly id: string; readonly result: AnalysisResult }> {
	const { id } = await startAnalysis(access, planRequestSchema.parse(plan));
	for await (const event of watchAnalysis(id)) if (event.type === 'failed') throw new Error(event.failure.message);
	const result = (await analyses.find(access, id))?.result;
	if (result === null || result === undefined) throw new Error('Expected the analysis of the example to finish.');
	return { id, result };
}
