/**
 * Advance widths of the Arial metric (shared by Arimo), thousandths of the type size, for the characters 32 to 126.
 * The upright widths: the italic has the same ones. The interface faces are a little narrower, so that a width
 * estimated here never falls short on screen.
 */
const ADVANCES =
	'278 278 355 556 556 889 667 191 333 333 389 584 278 333 278 278 556 556 556 556 556 556 556 556 556 556 278 278 584 584 584 556 1015 667 667 722 722 667 611 778 722 278 500 667 556 833 722 778 667 778 722 667 611 722 667 944 667 667 611 278 278 278 469 556 333 556 556 500 556 556 278 556 556 222 222 500 222 833 556 556 556 556 333 500 278 556 500 722 500 500 500 334 260 334 584'
		.split(' ')
		.map(Number);

const UNKNOWN_ADVANCE = 600;
const WIDE_ADVANCE = 1000;
const FIRST_WIDE = 0x2e80;

/** Width of a line of text at a type size; unit of `size`. An estimate for characters beyond ASCII. */
export function textWidth(text: string, size: number): number {
	let thousandths = 0;
	for (const character of text) {
		// A letter with a diacritic is as wide as the letter; the mark itself is no wider than nothing.
		for (const part of character.normalize('NFD')) thousandths += advance(part);
	}
	return (thousandths * size) / 1000;
}

function advance(character: string): number {
	const code = character.codePointAt(0) ?? 0;
	if (code >= 0x300 && code <= 0x36f) return 0;
	if (code >= FIRST_WIDE) return WIDE_ADVANCE;
	return ADVANCES[code - 32] ?? UNKNOWN_ADVANCE;
}

/** The text, or as much of it as fits in `width` with an ellipsis at its end. */
export function fitText(text: string, size: number, width: number): string {
	if (textWidth(text, size) <= width) return text;
	const characters = [...text];
	while (characters.length > 1 && textWidth(`${characters.join('')}…`, size) > width) characters.pop();
	return `${characters.join('').trimEnd()}…`;
}
