import { pageRemarks } from '#lib/analysis/words/pageWords.ts';
import type { OverlapRunRequest } from '#lib/contracts/materials.ts';
import { confirmOf, type Answers } from '#lib/contracts/materialForms.ts';
import type { MatrixReading } from '#lib/overlap/matrixReading.ts';
import { overlapSummary } from '#lib/overlap/overlapSummary.ts';
import type { PairMatrix } from '#lib/overlap/pairMatrix.ts';
import { MATRIX_TEXT_LIMIT_BYTES } from '#lib/server/api/bytes.ts';
import { refuseLargeText } from '#lib/server/api/readBody.ts';
import { lowerOf } from '#lib/server/repositories/overlapRunRows.ts';
import { compute } from '#lib/server/jobs/pool.ts';
import { tinyWing } from '../tinyWing.ts';
import type { MatrixSeen, WingSeen } from './draft.ts';
import { matrixFactWords } from './materialWords.ts';
import { matrixQuestions } from './questions.ts';

type Given = Readonly<Record<string, string>>;

/**
 * What a table holds, before it is kept.
 * @throws {InputError} what the reader of matrices refuses
 * @throws {Refusal} 413 past the limit
 */
export async function lookAtMatrix(text: string, answers: Answers, given: Given): Promise<MatrixSeen> {
	refuseLargeText(text, MATRIX_TEXT_LIMIT_BYTES, 'a matrix text');
	const reading = await compute('readMatrix', { csv: text, measure: answers.measure ?? 'other', confirm: confirmOf(answers) });
	const { matrix, remarks } = reading;
	return {
		kind: 'matrix',
		headline: 'A matrix of species by species',
		facts: [...matrixFactWords(overlapSummary(matrix)), shapeWords(reading)],
		remarks: pageRemarks(remarks),
		questions: matrixQuestions(remarks, given),
		wing: wingOf(matrix, [])
	};
}

export function overlapRunRequest(label: string, text: string, answers: Answers): OverlapRunRequest {
	return { label, measure: answers.measure ?? 'other', csv: text, confirm: confirmOf(answers) };
}

const SHAPES = { square: 'a full square', lower: 'a lower half', upper: 'an upper half', pairs: 'a list of pairs' } as const;
const SEPARATORS = { ',': 'commas', ';': 'semicolons', '\t': 'tabs' } as const;

function shapeWords({ shape, separator, decimal }: MatrixReading): string {
	const cells = separator === null ? '' : `, cells between ${SEPARATORS[separator]}`;
	return `${SHAPES[shape]}${cells}${decimal === ',' ? ', decimal commas' : ''}`;
}

/** Above so many species single cells are not seen, and their values would be a long answer. */
const DRAWN_UP_TO_SPECIES = 300;
const PRECISION = 10_000;

/** A wing in tree order, values to four decimals. Species the tree does not have follow as in the file. */
export function wingOf(matrix: PairMatrix, order: readonly string[]): WingSeen {
	const { species } = matrix;
	if (species.length > DRAWN_UP_TO_SPECIES) return tinyWing({ species, lower: lowerOf(matrix) }, order);
	const place = new Map(order.map((name, index) => [name, index]));
	const rank = (index: number) => place.get(species[index] ?? '') ?? order.length + index;
	const sorted = species.map((_, index) => index).sort((a, b) => rank(a) - rank(b));
	const lower = sorted.flatMap((i, row) =>
		sorted.slice(0, row).map((j) => Math.round((matrix.values[i * species.length + j] ?? Number.NaN) * PRECISION) / PRECISION)
	);
	return { species: sorted.map((index) => species[index] ?? ''), lower };
}
