import { pageRemarks } from '#lib/analysis/words/pageWords.ts';
import { MEASURE_NAMES } from '#lib/contracts/measure.ts';
import type { Access } from '#lib/server/access.ts';
import { deletionOf } from '#lib/server/deletion.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import * as names from '#lib/server/repositories/names.ts';
import { matrixOf, type OverlapRun } from '#lib/server/repositories/overlapRunRows.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { drawTreeSet } from '../../materials/drawTree.server.ts';
import { wingOf } from '../../materials/lookAtMatrix.server.ts';
import { overlapFigures } from '../overlapFigures.ts';
import { gapProposal } from './gapProposal.ts';
import { readingWords } from './readingWords.ts';

/** A larger square is shown one species at a time. */
const SQUARE_UP_TO = 60;

/** One overlap run: its wing in tree order, what it holds, how it was read, and what could be done about missing pairs. */
export async function runPage(access: Access, run: OverlapRun, chosen: string | null) {
	const { id, label, measure, species, lower, remarks, createdAt, reading } = run;
	const treeSet = (await treeSets.list(access))[0];
	const pairs = (await names.matching(access, { overlapRun: id }))?.pairs ?? [];
	const order = treeOrder(treeSet?.tips ?? [], pairs);
	const isWhole = treeSet !== undefined && pairs.length === species.length && pairs.length === treeSet.tips.length;
	const matrix = matrixOf(run);
	const usedBy = (await analyses.list(access)).filter(({ overlapRunId }) => overlapRunId === id).length;
	return {
		run: {
			id,
			label,
			at: createdAt,
			measure: measure === 'other' ? 'another measure of overlap' : MEASURE_NAMES[measure],
			remarks: pageRemarks(remarks)
		},
		figures: overlapFigures(species.length, lower),
		reading: readingWords(reading),
		usedBy,
		deletion: deletionOf(access, { createdBy: run.createdBy, isUsed: usedBy > 0 }),
		wing: wingOf(matrix, order),
		order: order.length === 0 ? null : { tree: treeSet?.label ?? '', strangers: species.length - pairs.length },
		drawing: isWhole ? await drawTreeSet(treeSet) : null,
		row: species.length > SQUARE_UP_TO ? rowOf(run, chosen) : null,
		proposal: gapProposal(matrix, pairs.length < 2 ? species : pairs.map((pair) => pair.species))
	};
}

/** Names of the data in the order of the tree; empty when the two share no name. */
function treeOrder(tips: readonly string[], pairs: readonly { readonly tip: string; readonly species: string }[]): string[] {
	const nameOf = new Map(pairs.map(({ tip, species }) => [tip, species]));
	return tips.flatMap((tip) => nameOf.get(tip) ?? []);
}

/** One species against all others. */
function rowOf({ species, lower }: OverlapRun, chosen: string | null) {
	const at = Math.max(0, species.indexOf(chosen ?? ''));
	const valueAt = (other: number) =>
		lower[(Math.max(at, other) * (Math.max(at, other) - 1)) / 2 + Math.min(at, other)] ?? Number.NaN;
	const values = species.flatMap((name, other) => {
		const value = valueAt(other);
		return other === at ? [] : [{ species: name, overlap: Number.isNaN(value) ? null : value }];
	});
	return { of: species[at] ?? '', names: species, values };
}
