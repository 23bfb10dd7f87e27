import { headlineWords, type HeadlineFigures } from '#lib/analysis/words/headlineWords.ts';
import { formatCount } from '#lib/analysis/words/numbers.ts';
import type { AgeUnit } from '#lib/contracts/materials.ts';
import type { Measure } from '#lib/contracts/measure.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { ALTERNATIVE_CHOICES, measureWords, STATISTIC_CHOICES, TRANSFORM_CHOICES, treeWords, wordsOf } from './planWords.ts';

/** What is needed of an analysis to set it beside another. */
export type Compared = {
	readonly id: string;
	readonly plan: Plan;
	readonly tree: { readonly label: string; readonly treeCount: number; readonly ageUnit: AgeUnit };
	readonly run: { readonly label: string; readonly measure: Measure };
	readonly headline: (HeadlineFigures & { readonly title: string; readonly species: number }) | null;
};

export type ComparisonRow = { readonly term: string; readonly facts: readonly [string, string]; readonly differs: boolean };
export type Comparison = { readonly ids: readonly [string, string]; readonly rows: readonly ComparisonRow[] };

/** Two analyses row by row: what was asked, then what came of it; the rows that differ are marked. */
export function comparison(first: Compared, second: Compared): Comparison {
	const rows = TERMS.map(({ term, fact }): ComparisonRow => {
		const facts = [fact(first), fact(second)] as const;
		return { term, facts, differs: facts[0] !== facts[1] };
	});
	return { ids: [first.id, second.id], rows };
}

const NOTHING = 'no result';

const TERMS: readonly { readonly term: string; readonly fact: (one: Compared) => string }[] = [
	{ term: 'Matrix', fact: ({ run }) => measureWords(run) },
	{ term: 'Tree', fact: ({ tree, plan }) => treeWords(tree, plan.tree) },
	{ term: 'Species', fact: ({ plan }) => (plan.species === 'shared' ? 'all that are shared' : `${plan.species.length} chosen`) },
	{ term: 'Direction', fact: ({ plan }) => wordsOf(ALTERNATIVE_CHOICES, plan.alternative) },
	{ term: 'Statistic', fact: ({ plan }) => wordsOf(STATISTIC_CHOICES, plan.statistic) },
	{ term: 'Scale', fact: ({ plan }) => wordsOf(TRANSFORM_CHOICES, plan.transform) },
	{ term: 'Level', fact: ({ plan }) => String(plan.alpha) },
	{ term: 'Shuffles', fact: ({ plan }) => formatCount(plan.permutations) },
	{ term: 'Seed', fact: ({ plan }) => String(plan.seed) },
	{ term: 'Finding', fact: ({ headline }) => headline?.title ?? NOTHING },
	{ term: 'Slope', fact: (one) => figuresOf(one)?.slope ?? NOTHING },
	{ term: 'p', fact: (one) => withSign(figuresOf(one)?.p) },
	{ term: 'p within the deepest split', fact: (one) => withSign(figuresOf(one)?.within) },
	{ term: 'Species used', fact: ({ headline }) => (headline === null ? NOTHING : formatCount(headline.species)) }
];

function figuresOf({ headline, plan, tree }: Compared) {
	return headline === null ? null : headlineWords(headline, { alternative: plan.alternative, ageUnit: tree.ageUnit });
}

function withSign(p: string | undefined): string {
	if (p === undefined) return NOTHING;
	return /^[=≤]/.test(p) ? `p ${p}` : p;
}
