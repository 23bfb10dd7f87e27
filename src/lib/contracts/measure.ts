export const MEASURES = [
	'schoener-d',
	'warren-i',
	'pianka',
	'morisita-horn',
	'jaccard',
	'sorensen',
	'range-overlap',
	'spearman-cells',
	'other'
] as const;
export type Measure = (typeof MEASURES)[number];

/** The measure as written in a sentence. */
export const MEASURE_NAMES: Readonly<Record<Measure, string>> = {
	'schoener-d': 'Schoener’s D',
	'warren-i': 'Warren’s I',
	pianka: 'Pianka’s overlap',
	'morisita-horn': 'Morisita–Horn overlap',
	jaccard: 'Jaccard overlap',
	sorensen: 'Sørensen overlap',
	'range-overlap': 'range overlap',
	'spearman-cells': 'rank correlation over cells',
	other: 'overlap'
};
