export type Download = { readonly file: string; readonly words: string };
export type DownloadGroup = { readonly title: string; readonly words: string; readonly files: readonly Download[] };

/** Files under static/examples, to try the program with. All species and data are invented. */
export const DOWNLOADS: readonly DownloadGroup[] = [
	{
		title: 'Lanternfrogs of the Merrow Range',
		words: '26 species whose niches changed along the tree. Overlap falls with age, clearly but not spectacularly.',
		files: [
			{ file: 'lanternfrogs/summary-tree.nwk', words: 'Dated tree, ages in Ma, root 18.4' },
			{ file: 'lanternfrogs/posterior-trees.nex', words: '200 trees around it, for the uncertainty of the dates' },
			{ file: 'lanternfrogs/overlap-d.csv', words: 'Schoener’s D of every pair, full square' },
			{ file: 'lanternfrogs/overlap-i.csv', words: 'Warren’s I of every pair, full square' },
			{ file: 'lanternfrogs/truth.json', words: 'What the data were made from: seed, rates, true niches' }
		]
	},
	{
		title: 'Moss beetles of the Merrow Range',
		words: '18 species whose niches the tree had no say in: what the absence of a relation looks like.',
		files: [
			{ file: 'moss-beetles/summary-tree.nwk', words: 'Dated tree, ages in Ma' },
			{ file: 'moss-beetles/overlap-d.csv', words: 'Schoener’s D of every pair, full square' },
			{ file: 'moss-beetles/overlap-i.csv', words: 'Warren’s I of every pair, full square' },
			{ file: 'moss-beetles/truth.json', words: 'What the data were made from' }
		]
	},
	{
		title: 'As a colleague might send them',
		words: 'Eight of the lanternfrogs, untidy: names that need you, halves, decimal commas.',
		files: [
			{ file: 'messy/tree.nwk', words: 'One species more than the matrices, a quoted name, a comment' },
			{ file: 'messy/half-matrix.csv', words: 'Lower half, semicolons, decimal commas' },
			{ file: 'messy/pair-list.csv', words: 'One pair a line, underscored names, one misspelt' }
		]
	},
	{
		title: 'About these files',
		words: 'All of it is invented. Nothing may be concluded from it about any real species or place. CC0: use it for anything.',
		files: [{ file: 'README.txt', words: 'What each file holds and how it was made' }]
	}
];
