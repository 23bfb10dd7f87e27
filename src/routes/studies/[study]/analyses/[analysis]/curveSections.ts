import {
	AGE_CLASS_CAUTION,
	ageClassSentence,
	fallCaution,
	fallSentence,
	INFLUENCE_CAUTION,
	influenceSentence,
	noFallSentence,
	POWER_CAUTION,
	powerSentence
} from '#lib/analysis/words/curveSentences.ts';
import { ageScaleOf } from './ageScaleOf.ts';
import type { Findings } from './findingsView.ts';

const AGE_CLASSES = {
	id: 'age-classes',
	title: 'Overlap by age',
	sentence: (findings: Findings) =>
		findings.ageClasses === undefined ? null : ageClassSentence(findings.ageClasses, ageScaleOf(findings)),
	caution: () => AGE_CLASS_CAUTION,
	load: () => import('./sections/AgeClasses.svelte')
};

const FALL = {
	id: 'random-walk',
	title: 'Beside a random walk',
	sentence: (findings: Findings) =>
		findings.fall === undefined ? noFallSentence(findings.compared.measure) : fallSentence(findings.fall, ageScaleOf(findings)),
	caution: (findings: Findings) => (findings.fall === undefined ? null : fallCaution(findings.fall, ageScaleOf(findings))),
	load: () => import('./sections/Fall.svelte')
};

const INFLUENCE = {
	id: 'influence',
	title: 'One species at a time',
	sentence: ({ influence, regression, compared }: Findings) =>
		influence === undefined ? null : influenceSentence(influence, regression.slope, compared.ageUnit),
	caution: () => INFLUENCE_CAUTION,
	load: () => import('./sections/Influence.svelte')
};

const POWER = {
	id: 'power',
	title: 'What could have been found',
	sentence: ({ power, permutation }: Findings) => (power === undefined ? null : powerSentence(power, permutation.statistic)),
	caution: () => POWER_CAUTION,
	load: () => import('./sections/Power.svelte')
};

export const CURVES = [AGE_CLASSES, FALL, INFLUENCE, POWER];
