import { pageRemarks } from '#lib/analysis/words/pageWords.ts';
import { treeSetRequestSchema, type TreeSetRequest } from '#lib/contracts/materials.ts';
import { confirmOf, type Answers } from '#lib/contracts/materialForms.ts';
import { TREE_TEXT_LIMIT_BYTES } from '#lib/server/api/bytes.ts';
import { refuseLargeText } from '#lib/server/api/readBody.ts';
import { readTreeSet } from '#lib/server/repositories/readTreeSet.ts';
import type { TreesSeen } from './draft.ts';
import { drawTree } from './drawTree.server.ts';
import { counted, treeFactWords, treeKindWords } from './materialWords.ts';
import { treeQuestions } from './questions.ts';

type Given = Readonly<Record<string, string>>;

/**
 * What a text of trees holds, before it is kept.
 * @throws {InputError} what the reader of trees refuses
 * @throws {Refusal} 413 past the limit
 */
export async function lookAtTrees(text: string, answers: Answers, given: Given): Promise<TreesSeen> {
	refuseLargeText(text, TREE_TEXT_LIMIT_BYTES, 'a tree text');
	const { kind, treeCount, summary, remarks } = await readTreeSet(treeTextOf(text, answers));
	// A share of the trees is a number by now.
	const { burnIn = 0, thin = 1 } = summary;
	const isDated = summary.rootAge !== null;
	// A set thinned to one tree still holds several, and the choice can be taken back.
	const isSeveral = treeCount > 1 || burnIn > 0 || thin > 1;
	return {
		kind: 'trees',
		headline: headlineOf(treeCount, isDated),
		facts: [
			...(isSeveral ? [treeKindWords(kind, treeCount)] : []),
			...treeFactWords({ ...summary, ageUnit: answers.ageUnit ?? 'Ma' })
		],
		remarks: pageRemarks(remarks),
		questions: treeQuestions(isSeveral, remarks, given),
		drawing: isDated ? await drawTree(text, burnIn, summary) : null
	};
}

function headlineOf(treeCount: number, isDated: boolean): string {
	if (treeCount === 1) return isDated ? 'A dated tree' : 'A tree without ages';
	return isDated ? counted(treeCount, 'dated tree', 'dated trees') : `${counted(treeCount, 'tree', 'trees')} without ages`;
}

function treeTextOf(text: string, answers: Answers) {
	const { treeKind: kind, burnIn, thin } = answers;
	return { text, kind, burnIn, thin, confirm: confirmOf(answers) };
}

export function treeSetRequest(label: string, text: string, answers: Answers): TreeSetRequest {
	const { ageUnit = 'Ma' } = answers;
	return treeSetRequestSchema.parse({ label, ageUnit, ...treeTextOf(text, answers) });
}
