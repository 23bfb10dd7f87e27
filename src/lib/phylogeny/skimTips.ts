import { COMMA, END, OPEN, QUOTED, type Scanner, SEMICOLON, WORD } from './scanner.ts';

/**
 * Tips from the current one to the end of a tree, this one included, counted without keeping anything: a tip is a label
 * that follows "(" or ",".
 */
export function skimTips(scanner: Scanner): number {
	let count = 1;
	let previous = WORD;
	for (let token = scanner.next(); token !== SEMICOLON && token !== END; token = scanner.next()) {
		if ((token === WORD || token === QUOTED) && (previous === OPEN || previous === COMMA)) count += 1;
		previous = token;
	}
	return count;
}
