import { db } from '#lib/server/db/client.ts';
import { analyses, overlapRuns, reports, studies, texts, treeSets } from '#lib/server/db/schema.ts';
import { planSchema } from '#lib/contracts/plan.ts';
import { newId } from '#lib/server/repositories/newId.ts';

export type FilledStudy = { study: string; treeSet: string; overlapRun: string; analysis: string; report: string };

type Options = { lab: string; createdBy: string; isExample?: boolean };

/** A study with one of everything, as rows: enough for whatever asks only where something is. */
export async function fillStudy({ lab, createdBy, isExample = false }: Options): Promise<FilledStudy> {
	const ids = { study: newId(), treeSet: newId(), overlapRun: newId(), analysis: newId(), report: newId() };
	const inStudy = { studyId: ids.study, createdBy };
	const textHash = newId();
	await db().insert(studies).values({ id: ids.study, labId: lab, title: 'A study', createdBy, isExample });
	await db().insert(texts).values({ hash: textHash, bytes: 0 });
	const summary = { tipCount: 0, ultrametricSpread: null, polytomies: 0, rootAge: null, tips: [] };
	const trees = { id: ids.treeSet, label: 'Trees', textHash, ageUnit: 'Ma', kind: 'summary', treeCount: 1 } as const;
	await db()
		.insert(treeSets)
		.values({ ...inStudy, ...trees, remarks: [], summary });
	const run = { id: ids.overlapRun, label: 'Run', measure: 'schoener-d', lower: Buffer.alloc(0), reading: {} } as const;
	await db()
		.insert(overlapRuns)
		.values({ ...inStudy, ...run, species: [], remarks: [] });
	await db()
		.insert(analyses)
		.values({ ...inStudy, id: ids.analysis, treeSetId: ids.treeSet, overlapRunId: ids.overlapRun, ...analysisRow(ids) });
	const figure = { widthMm: 174, dpi: 600, age: 'left', palette: 'kithline', typeSizePt: 7 } as const;
	await db()
		.insert(reports)
		.values({ ...inStudy, id: ids.report, analysisId: ids.analysis, title: 'Report', caption: '', figure });
	return ids;
}

function analysisRow({ treeSet, overlapRun }: FilledStudy) {
	const plan = planSchema.parse({ treeSet, overlapRun, tree: 0, seed: 1 });
	return { plan, hash: newId(), decisions: [], status: 'waiting' as const };
}
