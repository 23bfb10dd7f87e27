import { STATISTIC_WORDS } from '#lib/analysis/words/statisticWords.ts';
import { formatCount, formatP, formatShare, formatSlope } from '#lib/analysis/words/numbers.ts';
import { unitWords } from '#lib/analysis/words/units.ts';
import type { AnalysisResult, Finding } from '#lib/contracts/analysisResult.ts';
import { MEASURE_NAMES } from '#lib/contracts/measure.ts';

export type ThreadKey = NonNullable<Finding['parts'][number]['key']>;

type Told = Pick<AnalysisResult, 'compared' | 'species' | 'pairs' | 'dropped' | 'regression' | 'permutation' | 'engine'>;

/** Where the numbers came from that a person brought. */
export type Sources = {
	readonly tree: { readonly label: string; readonly textHash: string };
	readonly run: { readonly label: string; readonly textHash: string | null };
};

/** Where a number of the sentence came from, step by step down to the texts that were brought. */
export function thread(key: ThreadKey, told: Told, sources: Sources): string[] {
	const steps: Record<ThreadKey, () => string[]> = {
		slope: () => [slopeStep(told), ...materialSteps(told, sources)],
		p: () => [pStep(told), shuffleStep(told), slopeStep(told)],
		shuffles: () => [shuffleStep(told), engineStep(told)],
		within: () => withinSteps(told),
		species: () => [speciesStep(told), ...materialSteps(told, sources)]
	};
	return steps[key]();
}

function slopeStep({ regression, pairs, compared }: Told): string {
	const per = unitWords(compared.ageUnit).per;
	return `Slope ${formatSlope(regression.slope, 5)} ${per}: least squares over ${formatCount(pairs)} pairs, overlap on the age of the common ancestor.`;
}

function pStep({ permutation, compared }: Told): string {
	const { asExtreme, count, exact, p } = permutation;
	const sides = compared.alternative === 'two-sided' ? '2 × ' : '';
	const fraction = exact
		? `${formatCount(asExtreme)} / ${formatCount(count)}`
		: `(${formatCount(asExtreme)} + 1) / (${formatCount(count)} + 1)`;
	return `p ${formatP(p, null)}: ${sides}${fraction}${exact ? '' : '; the arrangement observed counts as one'}.`;
}

function shuffleStep({ permutation, compared, engine }: Told): string {
	const verb = STATISTIC_WORDS[permutation.statistic].asExtreme[compared.alternative];
	const all = permutation.exact
		? `all ${formatCount(permutation.count)} relabellings`
		: `${formatCount(permutation.count)} shuffles drawn from seed ${engine.seed}`;
	return `${formatCount(permutation.asExtreme)} of ${all} ${verb}, ties included.`;
}

function engineStep({ permutation, engine }: Told): string {
	return permutation.exact ? `Engine ${engine.version}.` : `Seed ${engine.seed}, engine ${engine.version}.`;
}

function withinSteps({ permutation }: Told): string[] {
	const within = permutation.withinDeepestSplit;
	if (within === null) return ['The sides of the root hold too few species to be shuffled.'];
	const sides = within.sides.map(formatCount).join(' and ');
	return [
		`Species were shuffled only within the sides of the root, ${sides} species, in ${formatCount(within.count)} ${within.exact ? 'relabellings, all there are' : 'shuffles'}.`,
		`${formatShare(within.rootPairShare)} of all pairs meet at the root; they keep their age in every one of these.`
	];
}

function speciesStep({ species, pairs, dropped }: Told): string {
	const left =
		dropped.length === 0
			? 'none left out'
			: `${formatCount(dropped.length)} ${dropped.length === 1 ? 'name' : 'names'} left out, each with its reason below`;
	return `${formatCount(species)} species that tree and matrix share, ${formatCount(pairs)} pairs; ${left}.`;
}

function materialSteps({ compared }: Told, { tree, run }: Sources): string[] {
	const sum = (hash: string | null) => (hash === null ? '' : `, SHA-256 ${hash.slice(0, 12)}…`);
	return [
		`${MEASURE_NAMES[compared.measure]} from “${run.label}”${sum(run.textHash)}.`,
		`Ages from “${tree.label}”${compared.tree.treesInSet > 1 ? `, tree ${compared.tree.index}` : ''}${sum(tree.textHash)}.`
	];
}
