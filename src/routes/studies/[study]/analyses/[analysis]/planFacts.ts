import { formatCount } from '#lib/analysis/words/numbers.ts';
import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { MEASURE_NAMES, type Measure } from '#lib/contracts/measure.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { furtherFacts } from '../furtherWords.ts';
import { STATISTIC_CHOICES, treeWords, wordsOf } from '../planWords.ts';

export type Fact = { readonly term: string; readonly fact: string };

type Materials = {
	readonly tree: { readonly label: string; readonly treeCount: number };
	readonly run: { readonly label: string; readonly measure: Measure };
};

const QUESTIONS = { less: 'falls with age', greater: 'rises with age', 'two-sided': 'falls or rises with age' } as const;

/** What was compared, for the margin. */
export function comparedFacts({ tree, run }: Materials, { tree: index, species }: Pick<Plan, 'tree' | 'species'>): Fact[] {
	return [
		{ term: 'Tree', fact: treeWords(tree, index) },
		{ term: 'Overlap run', fact: run.label },
		{ term: 'Measure', fact: MEASURE_NAMES[run.measure] },
		{ term: 'Species', fact: species === 'shared' ? 'all that are shared' : `${formatCount(species.length)} chosen` }
	];
}

type Tested = Pick<AnalysisResult['permutation'], 'exact' | 'count'>;

/** How it was asked, for the margin; with `tested`, what was done where every relabelling could be counted. */
export function planFacts(plan: Plan, tested: Tested | null = null): Fact[] {
	return [
		{ term: 'Question', fact: QUESTIONS[plan.alternative] },
		{ term: 'Judged by', fact: wordsOf(STATISTIC_CHOICES, plan.statistic).replace(/^the /, '') },
		...(plan.transform === 'logit' ? [{ term: 'Scale', fact: 'logit' }] : []),
		{ term: 'Level', fact: String(plan.alpha) },
		...furtherFacts(plan),
		...shuffleFacts(plan, tested)
	];
}

function shuffleFacts({ permutations, seed }: Plan, tested: Tested | null): Fact[] {
	const asked = formatCount(permutations);
	if (tested?.exact) return [{ term: 'Shuffles', fact: `all ${formatCount(tested.count)} relabellings (${asked} asked for)` }];
	return [
		{ term: 'Shuffles', fact: asked },
		{ term: 'Seed', fact: String(seed) }
	];
}
