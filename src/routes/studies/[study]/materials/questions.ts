import { AGE_UNITS, type AgeUnit } from '#lib/contracts/materials.ts';
import { MEASURE_NAMES, MEASURES } from '#lib/contracts/measure.ts';
import type { Remark } from '#lib/remarks/remark.ts';

type Option = { readonly value: string; readonly text: string };
export type Field =
	| {
			readonly type: 'choice';
			readonly name: string;
			readonly label: string;
			readonly value: string;
			readonly options: readonly Option[];
	  }
	| { readonly type: 'number'; readonly name: string; readonly label: string; readonly value: string; readonly least: number }
	| { readonly type: 'text'; readonly name: string; readonly label: string; readonly value: string }
	| { readonly type: 'tick'; readonly name: string; readonly label: string; readonly value: string };

/** Answers that a draft carries on when their question is not shown any more. */
export const SETTLING_FIELDS = ['readAs', 'valueKind', 'scale', 'triangle', 'spread', 'covariateScale'] as const;

/** One question as a sentence with its answers in it. */
export type Question = {
	readonly parts: readonly (string | Field)[];
	/** how the text is used hangs on the answer, and it has none yet */
	readonly isOpen: boolean;
};

type Given = Readonly<Record<string, string>>;

/** More would be a form; what is left is asked once these are answered. */
const MOST_QUESTIONS = 3;
const UNANSWERED = { value: '', text: 'choose …' };

/** What is asked about a text of one or several trees: unit of age, what several trees are, whether tips may be levelled. */
export function treeQuestions(isSeveral: boolean, remarks: readonly Remark[], given: Given): Question[] {
	const questions = [ageUnitQuestion(given)];
	if (isSeveral) questions.push(treeKindQuestion(given, has(remarks, 'burn-in')));
	return [...questions, ...treeSettleQuestions(remarks, given)];
}

/** What is asked about a matrix: the measure, and how doubtful values are meant, what has no answer yet before the rest. */
export function matrixQuestions(remarks: readonly Remark[], given: Given): Question[] {
	const doubts = matrixSettleQuestions(remarks, given).sort((a, b) => Number(b.isOpen) - Number(a.isOpen));
	return [measureQuestion(given), ...doubts].slice(0, MOST_QUESTIONS);
}

/** What is asked about a covariate: whether it is one, on which scale it counts, and where its halves differ. */
export function covariateQuestions(remarks: readonly Remark[], given: Given): Question[] {
	const isMatrix = { type: 'choice', name: 'readAs', label: 'What the text is', value: 'covariate', options: READ_AS } as const;
	const scale = {
		type: 'choice',
		name: 'covariateScale',
		label: 'Scale',
		value: given['covariateScale'] || 'plain',
		options: SCALES
	};
	return [
		{ parts: ['It is ', isMatrix, '.'], isOpen: false },
		{ parts: ['Its values count ', { ...scale, type: 'choice' }, '.'], isOpen: false },
		...covariateSettleQuestions(remarks, given)
	];
}

export function covariateSettleQuestions(remarks: readonly Remark[], given: Given): Question[] {
	return has(remarks, 'asymmetric', 'zero-filled-half') || given['triangle'] ? [triangleQuestion(given)] : [];
}

/** A table of niche positions asks only whether it is one. */
export function nicheQuestions(given: Given): Question[] {
	const isTable = {
		type: 'choice',
		name: 'readAs',
		label: 'What the text is',
		value: given['readAs'] || 'niches',
		options: READ_AS
	} as const;
	return [{ parts: ['It is ', isTable, '.'], isOpen: false }];
}

const READ_AS = [
	{ value: 'covariate', text: 'a covariate, such as distance' },
	{ value: 'matrix', text: 'a matrix of niche overlap' },
	{ value: 'niches', text: 'a table of niche positions, a row a species' }
];
const SCALES = [
	{ value: 'plain', text: 'as they are' },
	{ value: 'log', text: 'by their logarithm, ln(1 + value)' }
];

/** A question stays as long as its remark does, or its answer. */
export function treeSettleQuestions(remarks: readonly Remark[], given: Given): Question[] {
	if (!has(remarks, 'spread-needs-decision') && !given['spread']) return [];
	const label = 'All these species live now: extend their tips to the same time.';
	return [{ parts: [{ type: 'tick', name: 'spread', label, value: given['spread'] ?? '' }], isOpen: !given['spread'] }];
}

export function matrixSettleQuestions(remarks: readonly Remark[], given: Given): Question[] {
	const questions: Question[] = [];
	const asksKind = has(remarks, 'similarity-or-distance', 'negative-overlap', 'similarity-assumed');
	if (asksKind || given['valueKind'])
		questions.push(kindQuestion(has(remarks, 'similarity-or-distance', 'negative-overlap'), given));
	if (has(remarks, 'percent-or-fraction') || given['scale']) questions.push(scaleQuestion(given));
	if (has(remarks, 'asymmetric', 'zero-filled-half') || given['triangle']) questions.push(triangleQuestion(given));
	return questions;
}

function has(remarks: readonly Remark[], ...codes: readonly string[]): boolean {
	return remarks.some(({ code }) => codes.includes(code));
}

const UNIT_TEXTS: Readonly<Record<AgeUnit, string>> = {
	Ma: 'million years (Ma)',
	ka: 'thousand years (ka)',
	relative: 'relative units, without a clock'
};

function ageUnitQuestion(given: Given): Question {
	const options = AGE_UNITS.map((value) => ({ value, text: UNIT_TEXTS[value] }));
	const field = { type: 'choice', name: 'ageUnit', label: 'Unit of age', value: given['ageUnit'] || 'Ma', options } as const;
	return { parts: ['Its ages are in ', field, '.'], isOpen: false };
}

function treeKindQuestion(given: Given, asksBurnIn: boolean): Question {
	const options = [
		{ value: 'posterior', text: 'a posterior sample of one tree' },
		{ value: 'summary', text: 'summary trees, each for itself' }
	];
	const kind = {
		type: 'choice',
		name: 'treeKind',
		label: 'What the trees are',
		value: given['treeKind'] || 'posterior',
		options
	} as const;
	// Left empty until somebody answers, where the names of the trees say that a sampler's first steps are among them.
	const burnIn = {
		type: 'text',
		name: 'burnIn',
		label: 'Trees to leave out at the start, a number or a share such as 10 %',
		value: given['burnIn'] || (asksBurnIn ? '' : '0')
	} as const;
	const thin = {
		type: 'number',
		name: 'thin',
		label: 'Keep every so manieth tree',
		value: given['thin'] || '1',
		least: 1
	} as const;
	return { parts: ['They are ', kind, '; leave out the first ', burnIn, ' and keep one in ', thin, '.'], isOpen: asksBurnIn };
}

function measureQuestion(given: Given): Question {
	const named = MEASURES.map((value) => ({
		value,
		text: value === 'other' ? 'another measure of overlap' : MEASURE_NAMES[value]
	}));
	const value = given['measure'] ?? '';
	const field = { type: 'choice', name: 'measure', label: 'Measure', value, options: [UNANSWERED, ...named] } as const;
	return { parts: ['Its values are ', field, '.'], isOpen: value === '' };
}

function kindQuestion(mustBeSettled: boolean, given: Given): Question {
	const value = given['valueKind'] ?? '';
	const options = [
		UNANSWERED,
		{ value: 'similarity', text: 'full overlap (similarities)' },
		{ value: 'distance', text: 'no overlap (distances)' }
	];
	const field = { type: 'choice', name: 'valueKind', label: 'What the highest value means', value, options } as const;
	return { parts: ['The highest possible value means ', field, '.'], isOpen: mustBeSettled && value === '' };
}

function scaleQuestion(given: Given): Question {
	const value = given['scale'] ?? '';
	const options = [UNANSWERED, { value: 'percent', text: '100 (per cent)' }, { value: 'fraction', text: '1 (fractions)' }];
	return {
		parts: ['The whole is written as ', { type: 'choice', name: 'scale', label: 'Scale', value, options }, '.'],
		isOpen: value === ''
	};
}

function triangleQuestion(given: Given): Question {
	const value = given['triangle'] ?? '';
	const options = [
		UNANSWERED,
		{ value: 'average', text: 'the average of both' },
		{ value: 'upper', text: 'the upper half' },
		{ value: 'lower', text: 'the lower half' }
	];
	const field = { type: 'choice', name: 'triangle', label: 'Where the halves differ', value, options } as const;
	return { parts: ['Where the two halves differ, use ', field, '.'], isOpen: value === '' };
}
