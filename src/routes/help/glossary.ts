/** One word for one thing: in the pages, the API and the exports. */
export type GlossaryEntry = { readonly word: string; readonly means: string };
export type GlossaryGroup = { readonly title: string; readonly entries: readonly GlossaryEntry[] };

export const GLOSSARY: readonly GlossaryGroup[] = [
	{
		title: 'What you bring',
		entries: [
			{
				word: 'tree set',
				means:
					'One or more dated trees read from one text. A summary tree stands for the whole posterior sample; posterior trees carry the uncertainty of the dates. The unit of age is stated with it.'
			},
			{
				word: 'overlap run',
				means:
					'A stored matrix of niche overlap, every species against every other, with how it was made: the measure, the source, the comparison area and the cell size. A run is never changed; a new one takes its place.'
			},
			{
				word: 'comparison area',
				means:
					'The set of cells on which all the overlaps of a run were computed. Overlaps from different areas, or different cell sizes, cannot be compared.'
			},
			{
				word: 'suitability map',
				means:
					'The raster of one species: how suitable each cell is for it. Overlap measures such as D and I compare two of them cell by cell.'
			}
		]
	},
	{
		title: 'What is tested',
		entries: [
			{
				word: 'MRCA age',
				means:
					'The age of the most recent common ancestor of two species, read from the dated tree. All pairs that meet at one node share its age.'
			},
			{
				word: 'slope',
				means:
					'By how much overlap changes for each unit of MRCA age along a straight line through all pairs. Negative when overlap falls with age.'
			},
			{
				word: 'shuffle',
				means:
					'One random relabelling of the species among the tips. The tree stays, the overlaps stay, only who stands where changes. Many shuffles show which slopes chance alone would give.'
			},
			{
				word: 'permutation p',
				means:
					'The share of shuffles whose slope is at least as extreme as the one observed, the observed arrangement counted among them. Pairs are not independent of each other, so the p of an ordinary regression is never shown as a test.'
			},
			{
				word: 'p within the deepest split',
				means:
					'The same test, but species change places only with species on their own side of the root. It asks whether anything is left when the oldest divergence is set aside.'
			},
			{
				word: 'node averages',
				means: 'One mean overlap for every node, over the pairs that meet there: weighted by branching, or with every pair equal.'
			},
			{
				word: 'seed',
				means:
					'The number from which all shuffles are drawn. The same inputs, plan and seed give the same result to the last digit, on any machine.'
			}
		]
	},
	{
		title: 'What you get',
		entries: [
			{
				word: 'plan',
				means:
					'Every choice of an analysis, written down before it runs. It has a fingerprint, so that a later change cannot pass unnoticed.'
			},
			{
				word: 'analysis',
				means:
					'A plan, the exact inputs it ran on, and its result, which is never changed afterwards. When a material changes, the analysis is marked out of date and you decide whether to run again.'
			},
			{
				word: 'covariate',
				means:
					'Another species-by-species matrix, such as the distance between ranges, which may go with both age and overlap. An analysis can tell what age explains after allowing for it; that does not remove spatial structure.'
			},
			{
				word: 'partial correlation',
				means:
					'How overlap goes with age once both are freed of what the covariates explain. Its p comes from shuffling what the covariates leave of the overlaps; the whole overlaps are shuffled too, as a check.'
			},
			{
				word: 'double semi-partialing',
				means:
					'The test of one coefficient among several: what that predictor has of its own is shuffled among the species, and the regression is made again.'
			},
			{
				word: 'variance inflation',
				means:
					'How many times less sure a coefficient is because its predictor goes with the others. From about 10 on they can hardly be told apart.'
			},
			{
				word: 'finding',
				means: 'The sentence that an analysis licenses. Beside it, how far this goes: what the result does not say.'
			},
			{
				word: 'plate',
				means: 'The one figure of an analysis: overlap matrix, tree, pairs against age and shuffled slopes, on shared axes.'
			},
			{ word: 'report', means: 'An analysis saved with a title, a caption, notes and figure settings, to print and to hand on.' }
		]
	},
	{
		title: 'Who does what',
		entries: [
			{
				word: 'lab',
				means:
					'A group of people who share studies. A reader reads and downloads; an analyst also creates, changes and runs; a lead also deletes, brings back and looks after the members. Everyone has a lab of their own from the start.'
			},
			{ word: 'study', means: 'One clade and one question, with its materials, overlap runs, analyses and reports.' },
			{
				word: 'remark',
				means:
					'Something the program noticed: for information, worth a look, or must be settled. Nothing is changed in silence; an analysis waits until what must be settled is settled.'
			},
			{ word: 'decision', means: 'What a person chose about a remark or a name, kept with who and when.' },
			{ word: 'log book', means: 'The record of who did what. Lines are added, never changed.' },
			{ word: 'example study', means: 'Ships with the program; its species and data are invented. Copy it to work with it.' }
		]
	}
];
