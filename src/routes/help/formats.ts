/** Small inputs in every form the program reads, all of the same four invented species. */
export type Format = { readonly title: string; readonly words: string; readonly sample: string };

export const TREE_FORMATS: readonly Format[] = [
	{
		title: 'Newick',
		words:
			'Branch lengths are time; all tips end together. An underscore in a name reads as a blank; other punctuation goes in single quotes.',
		sample: '((Lychnorana_arida:2.1,Lychnorana_tumida:2.1):4.3,\n (Lychnorana_lucens:3.0,Lychnorana_pallida:3.0):3.4);'
	},
	{
		title: 'NEXUS',
		words: 'One tree or a posterior sample, with or without a TRANSLATE table. Comments in square brackets are passed over.',
		sample:
			'#NEXUS\nBEGIN TREES;\n  TRANSLATE 1 Lychnorana_arida, 2 Lychnorana_tumida,\n    3 Lychnorana_lucens, 4 Lychnorana_pallida;\n  TREE one = [&R] ((1:2.1,2:2.1):4.3,(3:3.0,4:3.0):3.4);\n  TREE two = [&R] ((1:1.8,2:1.8):4.9,(3:3.3,4:3.3):3.4);\nEND;'
	}
];

export const MATRIX_FORMATS: readonly Format[] = [
	{
		title: 'A full square',
		words: 'Names in the first row and the first column. They are matched by name, so their order may differ.',
		sample:
			'species,L. arida,L. tumida,L. lucens,L. pallida\nL. arida,1,0.71,0.32,0.28\nL. tumida,0.71,1,0.35,0.30\nL. lucens,0.32,0.35,1,0.66\nL. pallida,0.28,0.30,0.66,1'
	},
	{
		title: 'One half',
		words: 'Above or below the diagonal, with or without it. Semicolons with decimal commas are read as they are meant.',
		sample:
			'species;L. arida;L. tumida;L. lucens;L. pallida\nL. arida;;;;\nL. tumida;0,71;;;\nL. lucens;0,32;0,35;;\nL. pallida;0,28;0,30;0,66;'
	},
	{
		title: 'A list of pairs',
		words: 'Two names and a value a line. Pairs that are not there count as missing.',
		sample:
			'species_a,species_b,overlap\nL. arida,L. tumida,0.71\nL. arida,L. lucens,0.32\nL. arida,L. pallida,0.28\nL. tumida,L. lucens,0.35\nL. tumida,L. pallida,0.30\nL. lucens,L. pallida,0.66'
	}
];
