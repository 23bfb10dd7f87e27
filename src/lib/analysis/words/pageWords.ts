/** What a page asks in the place of the API’s field, by the beginning of the sentence that names it. */
const ASKS: readonly (readonly [RegExp, string])[] = [
	[
		/Confirm the triangle: (upper|lower), or average[^.]*\./,
		'Say that the $1 half is meant, or take the average if the zeros are real.'
	],
	[/Confirm the triangle: [^.]*\./, 'Say which half counts, or keep the average.'],
	[/Confirm the kind: [^.]*\./, 'Say what the highest value means, full overlap or none.'],
	[/else confirm the kind\./, 'else say what the highest value means, full overlap or none.'],
	[/Confirm the scale: [^.]*\./, 'Say what the whole is written as, 100 or 1.'],
	[/Confirm that all species live now, and/, 'Say that all species live now, and'],
	[
		/Expected `burnIn` to leave at least one tree; the text holds (\d+) and `burnIn` is (\d+)\. Give a smaller number\./,
		'The text holds $1 trees, so leaving out the first $2 leaves none. Leave out fewer.'
	],
	[/ \(\d+ more: see `remarks`\)/, '']
];

/** A message as a page says it. The sentences of the readers name what a script sends; a page has buttons and lists instead. */
export function pageWords(message: string): string {
	return ASKS.reduce((text, [api, page]) => text.replace(api, page), message);
}

export function pageRemarks<Noticed extends { readonly message: string }>(remarks: readonly Noticed[]): Noticed[] {
	return remarks.map((one) => ({ ...one, message: pageWords(one.message) }));
}
