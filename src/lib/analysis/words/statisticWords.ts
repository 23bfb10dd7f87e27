import type { Alternative, Statistic } from '#lib/contracts/plan.ts';

type Words = {
	/** in the plan's sentence: “Judge by …” */
	readonly name: string;
	/** what a shuffle did that counts against the finding, by the direction asked */
	readonly asExtreme: Readonly<Record<Alternative, string>>;
};

const steep = { less: 'fell as steeply', greater: 'rose as steeply', 'two-sided': 'leaned as steeply that way' } as const;
const strong = { less: 'fell as strongly', greater: 'rose as strongly', 'two-sided': 'leaned as strongly that way' } as const;

export const STATISTIC_WORDS: Readonly<Record<Statistic, Words>> = {
	slope: { name: 'slope over all pairs', asExtreme: steep },
	'slope-log-age': { name: 'slope on the logarithm of age', asExtreme: steep },
	'nodes-plain': { name: 'slope of node means, every pair equal', asExtreme: steep },
	'nodes-nested': { name: 'slope of node means, weighted by branching', asExtreme: steep },
	spearman: { name: 'rank correlation of all pairs', asExtreme: strong }
};
