import { MEASURE_NAMES, type Measure } from '#lib/contracts/measure.ts';
import type { Alternative, Plan, Statistic } from '#lib/contracts/plan.ts';

/** How each choice of a plan is written in its sentence, and what it means. */
type Choice<Value> = { readonly value: Value; readonly words: string; readonly means: string };

export const STATISTIC_CHOICES: readonly Choice<Statistic>[] = [
	{
		value: 'slope',
		words: 'the slope over all pairs',
		means: 'Overlap on age, every pair once. One old split may hold many pairs; the test within it is always shown beside.'
	},
	{
		value: 'slope-log-age',
		words: 'the slope on the logarithm of age',
		means: 'For a fall that is quick at first and slow later. No pair may have age 0.'
	},
	{
		value: 'nodes-plain',
		words: 'the slope of node means, every pair equal',
		means: 'One mean for each common ancestor: an old split with many pairs counts once.'
	},
	{
		value: 'nodes-nested',
		words: 'the slope of node means, weighted by branching',
		means: 'One mean for each common ancestor, each branch of a side counting alike, however many species it has.'
	},
	{
		value: 'spearman',
		words: 'the rank correlation of all pairs',
		means: 'Only the order of ages and overlaps counts, not their size.'
	}
];

export const ALTERNATIVE_CHOICES: readonly Choice<Alternative>[] = [
	{ value: 'less', words: 'fall', means: 'Older pairs overlap less. One tail; a rise cannot count for it.' },
	{ value: 'greater', words: 'rise', means: 'Older pairs overlap more. One tail.' },
	{ value: 'two-sided', words: 'rise or fall', means: 'Either way; the smallest p is twice as large.' }
];

export const TRANSFORM_CHOICES: readonly Choice<'none' | 'logit'>[] = [
	{ value: 'none', words: 'as it is', means: 'The slope is overlap lost for each unit of age.' },
	{
		value: 'logit',
		words: 'on the logit scale',
		means: 'Spreads out values near 0 and 1. The slope cannot be read as overlap lost.'
	}
];

export const SHUFFLE_CHOICES = [999, 9_999, 99_999, 999_999] as const;

/** Up to so many species 99,999 shuffles take a few seconds at most; beyond, the page proposes fewer. */
const MANY_SPECIES = 200;

export function proposedShuffles(species: number): number {
	return species <= MANY_SPECIES ? 99_999 : 9_999;
}

export function wordsOf<Value>(choices: readonly Choice<Value>[], value: string): string {
	return choices.find((choice) => choice.value === value)?.words ?? value;
}

/** “Schoener’s D of “shared cells””, or the label alone where it names the measure itself. */
export function measureWords({ measure, label }: { readonly measure: Measure; readonly label: string }): string {
	const name = MEASURE_NAMES[measure];
	return label.replaceAll("'", '’').includes(name) ? label : `${name} of “${label}”`;
}

type Trees = { readonly label: string; readonly treeCount: number };

/** Words that a label begins with in a capital only because it stands alone. */
const COMMON_WORD = /^(Summary|Consensus|Dated|Species|Posterior|Time)(?= )/;

/** “the summary tree”, which tree of a set, or all of them. */
export function treeWords({ label, treeCount }: Trees, tree: Plan['tree']): string {
	const name = /^(the|a|an)\s/i.test(label) ? label : `the ${label.replace(COMMON_WORD, (word) => word.toLowerCase())}`;
	if (treeCount === 1) return name;
	return tree === 'all' ? `all ${treeCount.toLocaleString('en')} trees of “${label}”` : `tree ${tree} of “${label}”`;
}

/** What may be asked of a set of several trees. */
export function treeChoices(treeCount: number): readonly Choice<'all' | 'one'>[] {
	return [
		{
			value: 'all',
			words: `averaged over all ${treeCount.toLocaleString('en')} trees`,
			means: 'One test: the statistic is the mean over the trees, under the same shuffles. What the dating leaves open is in it.'
		},
		{ value: 'one', words: 'one tree only', means: 'The other trees are not looked at, and the findings say so.' }
	];
}

/** The tree that the fields of a plan name. */
export function treeAsked({ tree, treeNumber }: { readonly tree: string; readonly treeNumber: string }): Plan['tree'] {
	return tree === 'all' ? 'all' : Number(tree === 'one' ? treeNumber : tree);
}

type AskedOf = {
	readonly run: { readonly measure: Measure; readonly label: string };
	readonly tree: Trees;
	readonly plan: Pick<Plan, 'tree' | 'statistic' | 'species'>;
};

/** What an analysis was asked, in one line. */
export function askedWords({ run, tree, plan }: AskedOf): string {
	const parts = [
		measureWords(run),
		treeWords(tree, plan.tree),
		wordsOf(STATISTIC_CHOICES, plan.statistic),
		...(plan.species === 'shared' ? [] : [`${plan.species.length} chosen species`])
	];
	return parts.join(' · ');
}
