import { prepareAnalysis } from '#lib/analysis/prepareAnalysis.ts';
import { mrcaAges } from '#lib/phylogeny/mrcaAges.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import type { Access } from '#lib/server/access.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import { linearRegression } from '#lib/statistics/linearRegression.ts';
import { lowerTriangle } from '#lib/statistics/pairValues.ts';

/** Longer texts and larger trees are not read for the sake of a picture that stands for seconds. */
const LIVE_UP_TO_TIPS = 20_000;
const LIVE_UP_TO_SPECIES = 400;

export type TreeSize = { readonly tipCount: number; readonly treeCount: number };

/** Tree, overlaps and the observed line of an analysis that still runs; null where that is too much to draw. */
export async function liveMaterials(access: Access, id: string, { tipCount, treeCount }: TreeSize) {
	if (tipCount > LIVE_UP_TO_SPECIES || tipCount * treeCount > LIVE_UP_TO_TIPS) return null;
	const { inputs, plan } = await analyses.inputsOf(access, id);
	try {
		const { tree, ages, species, response } = prepareAnalysis(inputs, plan);
		const overlaps = lowerTriangle(response, species.length);
		const pairAges = lowerTriangle(mrcaAges(tree, ages), species.length);
		const { slope } = linearRegression(pairAges, overlaps);
		return {
			materials: {
				tree: { parent: [...tree.parent], age: [...ages], label: [...tree.label] },
				species: [...species],
				overlapLower: [...overlaps]
			},
			line: { slope, meanAge: mean(pairAges), meanOverlap: mean(overlaps) }
		};
	} catch (refused) {
		// The run itself will say why.
		if (refused instanceof InputError) return null;
		throw refused;
	}
}

function mean(values: Float64Array): number {
	return values.reduce((sum, value) => sum + value, 0) / values.length;
}
