import { formatCount, formatSlope } from '#lib/analysis/words/numbers.ts';
import { pageRemarks } from '#lib/analysis/words/pageWords.ts';
import type { CovariateReading } from '#lib/contracts/compute.ts';
import type { CovariateRequest } from '#lib/contracts/covariates.ts';
import type { Answers } from '#lib/contracts/materialForms.ts';
import { isPlaceHeader } from '#lib/overlap/readPlaces.ts';
import { MATRIX_TEXT_LIMIT_BYTES } from '#lib/server/api/bytes.ts';
import { refuseLargeText } from '#lib/server/api/readBody.ts';
import { compute } from '#lib/server/jobs/pool.ts';
import type { CovariateSeen } from './draft.ts';
import { covariateFactWords } from './covariateWords.ts';
import { covariateQuestions } from './questions.ts';

/**
 * What a table holds that is read as a covariate, before it is kept.
 * @throws {InputError} what the readers of covariates and of places refuse
 * @throws {Refusal} 413 past the limit
 */
export async function lookAtCovariate(
	text: string,
	answers: Answers,
	given: Readonly<Record<string, string>>
): Promise<CovariateSeen> {
	refuseLargeText(text, MATRIX_TEXT_LIMIT_BYTES, 'a covariate text');
	const { label: _label, ...asked } = covariateRequest('', text, answers);
	const read = await compute('readCovariate', asked);
	return {
		kind: 'covariate',
		headline: read.reading.source === 'places' ? 'Places of species' : 'A covariate of species by species',
		facts: [...covariateFactWords(read.species.length, read), rangeWords(read)],
		remarks: pageRemarks(read.remarks),
		questions: covariateQuestions(read.remarks, given)
	};
}

export function covariateRequest(label: string, text: string, answers: Answers): CovariateRequest {
	const { covariateScale: scale = 'plain', valueKind: kind, triangle } = answers;
	if (isPlaces(text)) return { label, places: text, scale };
	return { label, csv: text, scale, confirm: { kind, triangle } };
}

function isPlaces(text: string): boolean {
	const [head = ''] = text.split(/\r\n|\n|\r/).filter((line) => line.trim() !== '');
	return isPlaceHeader(head.split(/[\t;,]/).map((cell) => cell.trim().replace(/^"(.*)"$/, '$1')));
}

function rangeWords({ lower, reading }: CovariateReading): string {
	let [least, most, count] = [Number.POSITIVE_INFINITY, 0, 0];
	for (const value of lower) {
		if (Number.isNaN(value)) continue;
		count += 1;
		least = Math.min(least, value);
		most = Math.max(most, value);
	}
	const unit = reading.unit === null || reading.scale === 'log' ? '' : ` ${reading.unit}`;
	return `${formatCount(count)} pairs, ${formatSlope(least)} to ${formatSlope(most)}${unit}`;
}
