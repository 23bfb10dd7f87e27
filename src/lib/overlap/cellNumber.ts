import type { Decimal } from './matrixReading.ts';

const MISSING = new Set(['', 'na', 'n/a', '#n/a', 'nan', 'null', '-', '–', '—']);
const DIGIT = /\d/;
const POINT_NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;
const COMMA_NUMBER = /^[+-]?(\d+,?\d*|,\d+)(e[+-]?\d+)?$/i;

/** Whether a cell says that its value is missing: blank, NA, NaN or a dash. */
export function isMissing(cell: string): boolean {
	const mayBe = cell.length <= 4 && !DIGIT.test(cell);
	return mayBe && MISSING.has(cell.toLowerCase());
}

/** Whether a cell is a word: neither missing nor a number with a decimal point or comma. */
export function isWord(cell: string): boolean {
	const plain = plainMinus(cell);
	return !isMissing(cell) && !POINT_NUMBER.test(plain) && !COMMA_NUMBER.test(plain);
}

/** The number a cell holds; NaN when it holds none. */
export function cellNumber(cell: string, decimal: Decimal): number {
	const plain = plainMinus(cell);
	if (decimal === ',') return COMMA_NUMBER.test(plain) ? Number(plain.replace(',', '.')) : Number.NaN;
	return POINT_NUMBER.test(plain) ? Number(plain) : Number.NaN;
}

/** The decimal sign that most cells use, where commas do not separate them. */
export function decimalOf(count: number, textOf: (k: number) => string): Decimal {
	let points = 0;
	let commas = 0;
	for (let k = 0; k < count; k++) {
		const cell = textOf(k);
		if (cell.includes('.')) points += 1;
		else if (COMMA_NUMBER.test(cell) && cell.includes(',')) commas += 1;
	}
	return commas > points ? ',' : '.';
}

/** Spreadsheets and typeset tables write U+2212 for minus. */
function plainMinus(cell: string): string {
	return cell.charCodeAt(0) === 0x2212 ? `-${cell.slice(1)}` : cell;
}
