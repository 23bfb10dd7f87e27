import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { MEASURE_NAMES } from '#lib/contracts/measure.ts';
import { can } from '#lib/server/permissions.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import * as studies from '#lib/server/repositories/studies.ts';

/** Findings that a first look should meet; an example without a relation is shown only when there is no other. */
const SHOWN_FIRST: readonly string[] = ['signal', 'stronger-than-random-walk'];

/** The newest finished analysis of an example, as much of it as a plate and its sentence need; null when none is loaded. */
export async function livePlate(user: App.Locals['user']) {
	const shown: { study: studies.Study; id: string; kind: string }[] = [];
	for (const study of await studies.listExamples()) {
		const access = await can(user, 'read', { study: study.id });
		const newest = (await analyses.list(access)).find(({ headline }) => headline !== null);
		if (newest?.headline) shown.push({ study, id: newest.id, kind: newest.headline.kind });
	}
	const chosen = shown.find(({ kind }) => SHOWN_FIRST.includes(kind)) ?? shown[0];
	if (chosen === undefined) return null;
	const access = await can(user, 'read', { study: chosen.study.id });
	const analysis = await analyses.find(access, chosen.id);
	if (!analysis?.result) return null;
	const { id, title } = chosen.study;
	return { study: { id, title }, analysis: chosen.id, ...shownPart(analysis.result) };
}

function shownPart({ plate, regression, nodeAverages, permutation, finding, compared }: AnalysisResult) {
	const { slope, intercept } = regression;
	const nodes = nodeAverages.nodes.map(({ node, nested, plain }) => ({ node, nested, plain }));
	const { nested, plain } = nodeAverages;
	return {
		result: {
			plate,
			regression: { slope, intercept },
			nodeAverages: { nodes, nested: lineOf(nested), plain: lineOf(plain) },
			permutation: { count: permutation.count, exact: permutation.exact }
		},
		parts: finding.parts,
		measureName: MEASURE_NAMES[compared.measure],
		ageUnit: compared.ageUnit
	};
}

const lineOf = ({ slope, intercept }: { slope: number; intercept: number }) => ({ slope, intercept });
