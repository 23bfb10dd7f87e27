import { formatCount } from '#lib/analysis/words/numbers.ts';
import { pageRemarks } from '#lib/analysis/words/pageWords.ts';
import type { Answers } from '#lib/contracts/materialForms.ts';
import type { NicheTableRequest } from '#lib/contracts/nicheTables.ts';
import { MATRIX_TEXT_LIMIT_BYTES } from '#lib/server/api/bytes.ts';
import { refuseLargeText } from '#lib/server/api/readBody.ts';
import { compute } from '#lib/server/jobs/pool.ts';
import type { NichesSeen } from './draft.ts';
import { nicheFactWords } from './nicheWords.ts';
import { nicheQuestions } from './questions.ts';

/**
 * What a table of niche positions holds, before it is kept.
 * @throws {InputError} what its reader refuses
 * @throws {Refusal} 413 past the limit
 */
export async function lookAtNiches(
	text: string,
	_answers: Answers,
	given: Readonly<Record<string, string>>
): Promise<NichesSeen> {
	refuseLargeText(text, MATRIX_TEXT_LIMIT_BYTES, 'a table');
	const { species, variables, remarks } = await compute('readNicheTable', { csv: text });
	return {
		kind: 'niches',
		headline: 'A table of niche positions',
		facts: [`${formatCount(species.length)} species`, ...nicheFactWords(variables)],
		remarks: pageRemarks(remarks),
		questions: nicheQuestions(given)
	};
}

export function nicheTableRequest(label: string, text: string): NicheTableRequest {
	return { label, csv: text };
}
