import type { ComputeProgress, ComputeTask, ComputeTasks } from '#lib/contracts/compute.ts';
import { matrixFromBody, readMatrix } from '#lib/overlap/readMatrix.ts';
import { readNicheTable } from '#lib/overlap/readNicheTable.ts';
import { analyse } from './analyse.ts';
import { analyseShare } from './analyseShare.ts';
import { readCovariateMaterial } from './covariates/readCovariateMaterial.ts';
import { planPower } from './planPower.ts';
import { previewAnalysis } from './previewAnalysis.ts';
import { pairAges, readTreeFacts, treeStructure } from './readTreeFacts.ts';

type Handlers = {
	readonly [Task in ComputeTask]: (
		argument: ComputeTasks[Task]['argument'],
		report?: (progress: ComputeProgress) => void
	) => ComputeTasks[Task]['answer'];
};

/** What a compute thread can be asked: each task one call. */
export const computeTasks: Handlers = {
	readTrees: ({ text, confirm }) => readTreeFacts(text, confirm),
	readMatrix: ({ measure, confirm, csv, matrix }) =>
		matrix === undefined ? readMatrix(csv ?? '', { measure, confirm }) : matrixFromBody(matrix, { measure, confirm }),
	readCovariate: (given) => readCovariateMaterial(given),
	readNicheTable: ({ csv, roles }) => readNicheTable(csv, roles),
	treeStructure: ({ text, tree, spreadConfirmed }) => treeStructure(text, tree, spreadConfirmed),
	mrcaAges: ({ text, tree, spreadConfirmed, species }) =>
		pairAges(text, tree, { spreadConfirmed, ...(species ? { species } : {}) }),
	preview: ({ inputs, plan }) => previewAnalysis(inputs, plan),
	planPower: ({ inputs, plan }) => planPower(inputs, plan),
	analyseShare: ({ inputs, plan, share }, report) => analyseShare({ inputs, plan, share }, report),
	analyse: ({ inputs, plan, shares }, report) => analyse(inputs, plan, report, shares)
};
