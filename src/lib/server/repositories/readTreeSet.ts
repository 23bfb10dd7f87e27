import type { TreeFacts } from '#lib/contracts/compute.ts';
import type { Confirm, TreeSetKind } from '#lib/contracts/materials.ts';
import { rawSampleRemark } from '#lib/phylogeny/rawSampleRemark.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import { compute } from '#lib/server/jobs/pool.ts';
import type { Summary } from './treeSetRows.ts';

export type TreeText = {
	readonly text: string;
	readonly kind?: TreeSetKind | undefined;
	/** trees to leave out at the start, or their share where it is below 1 */
	readonly burnIn?: number | undefined;
	readonly thin?: number | undefined;
	readonly confirm?: Confirm | undefined;
};

/** What is kept of a text of trees, besides the text. */
export type TreeSetFacts = {
	readonly kind: TreeSetKind;
	readonly treeCount: number;
	readonly summary: Summary;
	readonly remarks: Remark[];
};

/**
 * Reads a text of trees on a compute thread.
 * @throws {InputError} what the reader refuses; `burn-in-too-long` when no tree is left
 */
export async function readTreeSet({ text, kind, burnIn: asked, thin = 1, confirm }: TreeText): Promise<TreeSetFacts> {
	const reading = await compute('readTrees', { text, ...(confirm === undefined ? {} : { confirm }) });
	const burnIn = countLeftOut(asked ?? 0, reading.trees.length);
	const used = reading.trees.filter((_, index) => index >= burnIn && (index - burnIn) % thin === 0);
	const first = used[0];
	if (first === undefined) throw burnInTooLong(reading.trees.length, burnIn);
	return {
		kind: kind ?? (reading.trees.length > 1 ? 'posterior' : 'summary'),
		treeCount: used.length,
		summary: summaryOf(first, burnIn, thin),
		remarks: [...reading.remarks, ...burnInRemarks(reading.trees, asked)]
	};
}

function summaryOf(first: TreeFacts, burnIn: number, thin: number): Summary {
	const { tips, ultrametricSpread, polytomies, rootAge } = first;
	return { tipCount: tips.length, tips: [...tips], ultrametricSpread, polytomies, rootAge, burnIn, thin };
}

function countLeftOut(burnIn: number, trees: number): number {
	return burnIn < 1 ? Math.floor(burnIn * trees) : burnIn;
}

/** Asked only where nobody has answered: a burn-in of 0 is an answer. */
function burnInRemarks(trees: readonly TreeFacts[], asked: number | undefined): Remark[] {
	if (asked !== undefined) return [];
	const found = rawSampleRemark(trees.map(({ name }) => name));
	return found === null ? [] : [found];
}

function burnInTooLong(trees: number, burnIn: number): InputError {
	return new InputError(
		'burn-in-too-long',
		`Expected \`burnIn\` to leave at least one tree; the text holds ${trees} and \`burnIn\` is ${burnIn}. Give a smaller number.`
	);
}
