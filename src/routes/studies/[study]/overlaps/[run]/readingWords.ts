const SHAPES: Readonly<Record<string, string>> = {
	square: 'read from a full square',
	lower: 'read from a lower half',
	upper: 'read from an upper half',
	pairs: 'read from a list of pairs'
};

/** How the values came out of the text, in a few words each; what was not changed is not mentioned. */
export function readingWords({ shape, kind, scale, decimal }: Readonly<Record<string, unknown>>): string[] {
	return [
		SHAPES[String(shape)] ?? '',
		kind === 'distance' ? 'given as distances, turned into overlaps by 1 − value' : '',
		scale === 'percent' ? 'given in per cent, divided by 100' : '',
		decimal === ',' ? 'decimal commas' : ''
	].filter((words) => words !== '');
}
