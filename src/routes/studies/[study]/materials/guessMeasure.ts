import type { Measure } from '#lib/contracts/measure.ts';

/** Words of a file name, whole, that speak for one measure. Single letters count only as a word of their own. */
const WORDS: readonly (readonly [RegExp, Measure])[] = [
	[/^(schoener|schoeners|d)$/, 'schoener-d'],
	[/^(warren|warrens|i)$/, 'warren-i'],
	[/^pianka/, 'pianka'],
	[/^(morisita|horn)$/, 'morisita-horn'],
	[/^jaccard/, 'jaccard'],
	[/^s[øo]rensen/, 'sorensen'],
	[/^(spearman|rankcorrelation)$/, 'spearman-cells'],
	[/^range$/, 'range-overlap']
];

/** The measure a file name speaks of; undefined when it names none, or more than one. */
export function guessMeasure(fileName: string): Measure | undefined {
	const words = fileName
		.replace(/\.\w{1,5}$/, '')
		.toLowerCase()
		.split(/[^\p{L}\d]+/u);
	const found = new Set(WORDS.filter(([word]) => words.some((one) => word.test(one))).map(([, measure]) => measure));
	return found.size === 1 ? [...found][0] : undefined;
}
