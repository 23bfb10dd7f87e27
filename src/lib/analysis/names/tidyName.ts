/** A name taken apart for comparison. */
export type TidyName = {
	/** as it stands in the material */
	readonly raw: string;
	/** whole name: NFC, no quotes, underscores as blanks, blanks collapsed, lower case */
	readonly key: string;
	/** the key without an authority at its end */
	readonly bareKey: string;
	/** the authority as written, '' without one */
	readonly authority: string;
};

const PARTICLES = new Set([
	'de',
	'del',
	'della',
	'der',
	'des',
	'di',
	'du',
	'la',
	'van',
	'von',
	'den',
	'et',
	'ex',
	'and',
	'in',
	'al.',
	'f.',
	'fil.',
	'&'
]);
const AUTHOR_WORD = /^(\p{Lu}\p{L}*\.|(\p{Lu}\.)+(-?\p{Lu}\.)*|(\p{Lu}\p{Ll}*['’-])?\p{Lu}['’]?\p{Ll}+(-\p{Lu}?\p{Ll}+)*)$/u;
const YEAR = /^1[789]\d\d[a-z]?$|^20\d\d[a-z]?$/;

/**
 * Takes a name apart. What follows genus and epithet counts as an authority when every word of it is a capitalised
 * author, a year or a particle ("Orr", "(Linnaeus, 1758)", "L.", "de Candolle ex Smith"). Codes of samples ("KU1234") and
 * lower-case epithets of subspecies are no authority and stay part of the name.
 */
export function tidyName(raw: string): TidyName {
	const spelled = withoutMarks(raw);
	const [genus, epithet, ...rest] = spelled.split(' ');
	const key = spelled.toLowerCase();
	const authority = rest.join(' ');
	if (genus === undefined || epithet === undefined || !/^\p{Ll}/u.test(epithet) || !isAuthority(rest)) {
		return { raw, key, bareKey: key, authority: '' };
	}
	return { raw, key, bareKey: `${genus} ${epithet}`.toLowerCase(), authority };
}

/** NFC, underscores as blanks, quotes dropped, blanks collapsed. */
function withoutMarks(raw: string): string {
	return raw
		.normalize('NFC')
		.replace(/["“”‘`´]|^['’]|['’]$/g, '')
		.replace(/[_\s\u00A0]+/g, ' ')
		.trim();
}

function isAuthority(words: readonly string[]): boolean {
	const bare = words.map((word) => word.replace(/[(),;[\]]/g, '')).filter((word) => word !== '');
	const isKnown = (word: string) => AUTHOR_WORD.test(word) || YEAR.test(word) || PARTICLES.has(word);
	return bare.some((word) => AUTHOR_WORD.test(word)) && bare.every(isKnown);
}

/** Two spellings of one authority: punctuation, brackets, case and the year's presence make no difference. */
export function isSameAuthority(a: string, b: string): boolean {
	return authorsOf(a) === authorsOf(b);
}

function authorsOf(authority: string): string {
	return authority
		.toLowerCase()
		.replace(/\d+/g, '')
		.replace(/[^\p{L}]+/gu, ' ')
		.trim();
}

/** What was set aside when two names agree after tidying, in words: “underscore for a blank, authority dropped: “Orr””. */
export function tidyingWords(species: TidyName, tip: TidyName): string {
	const [a, b] = [species.raw, tip.raw];
	const words: string[] = [];
	if (a.includes('_') !== b.includes('_')) words.push('underscore for a blank');
	if (hasQuotes(a) !== hasQuotes(b)) words.push('quotation marks dropped');
	if (hasSpareBlanks(a) !== hasSpareBlanks(b)) words.push('spare blanks dropped');
	const [plainA, plainB] = [withoutMarks(a), withoutMarks(b)].map((name) => name.split(' ').slice(0, 2).join(' '));
	if (plainA !== plainB) words.push('capital and small letters');
	const dropped = [species.authority, tip.authority].filter((authority) => authority !== '');
	const [first, second] = dropped;
	if (first !== undefined && second === undefined) words.push(`authority dropped: “${first}”`);
	if (first !== undefined && second !== undefined && first !== second)
		words.push(`authority written differently: “${first}”, “${second}”`);
	return words.length === 0 ? 'accents composed differently' : words.join(', ');
}

function hasQuotes(name: string): boolean {
	return /["“”‘`´]|^['’]|['’]$/.test(name);
}

function hasSpareBlanks(name: string): boolean {
	return /^\s|\s$|[\s_\u00A0]{2}|[\t\u00A0]/.test(name);
}
