import { formatCount } from '#lib/analysis/words/numbers.ts';
import type { Plan, Statistic } from '#lib/contracts/plan.ts';
import type { PlanValues } from '#lib/contracts/planForm.ts';
import { STATISTIC_CHOICES, wordsOf } from './planWords.ts';

/** “nothing else”, or the further statistics of a plan; the one it is judged by is not tested twice. */
export function furtherWords(further: readonly string[], judgedBy: string): string {
	const words = [...new Set(further)].filter((value) => value !== judgedBy).map((value) => wordsOf(STATISTIC_CHOICES, value));
	if (words.length === 0) return 'nothing else';
	return words.length <= 2 ? words.join(' and ') : `${formatCount(words.length)} further statistics`;
}

/** “no clades”, “clades of at least 3 species”, “2 declared clades”, from what is typed. */
export function cladeChoiceWords({ clades, cladeTips, declared }: Pick<PlanValues, 'clades' | 'cladeTips' | 'declared'>): string {
	if (clades === 'all') return `clades of at least ${cladeTips} species`;
	if (clades === '') return 'no clades';
	return declaredWords(declared.split('\n').filter((line) => line.trim() !== '').length);
}

/** What a plan asks beside its one test, for the margin; nothing where it asks nothing. */
export function furtherFacts({
	alsoTest,
	statistic,
	clades,
	covariates,
	signal
}: Plan): { readonly term: string; readonly fact: string }[] {
	const further: Statistic[] = [...new Set(alsoTest)].filter((value) => value !== statistic);
	return [
		...(further.length === 0 ? [] : [{ term: 'Also tested', fact: furtherWords(further, statistic) }]),
		...(covariates.length === 0 ? [] : [{ term: 'Allowed for', fact: covariateWords(covariates.length) }]),
		...(signal === null ? [] : [{ term: 'Signal in', fact: signalWords(signal.variables) }]),
		...(clades === null ? [] : [{ term: 'Clades', fact: cladeFact(clades) }])
	];
}

/** “no covariate”, “1 covariate”, “2 covariates”. */
export function covariateWords(count: number): string {
	return count === 0 ? 'no covariate' : `${formatCount(count)} ${count === 1 ? 'covariate' : 'covariates'}`;
}

function cladeFact({ minTips, declared }: NonNullable<Plan['clades']>): string {
	return declared === undefined ? `at least ${formatCount(minTips)} species` : declaredWords(declared.length);
}

function declaredWords(count: number): string {
	return `${formatCount(count)} declared ${count === 1 ? 'clade' : 'clades'}`;
}

/** “no niche position”, or the positions by name. */
export function signalWords(variables: readonly string[]): string {
	if (variables.length === 0) return 'no niche position';
	return variables.length <= 2 ? variables.join(' and ') : `${formatCount(variables.length)} niche positions`;
}
