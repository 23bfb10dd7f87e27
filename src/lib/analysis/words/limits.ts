import type { FindingKind } from '#lib/contracts/analysisResult.ts';
import type { FindingFacts } from './findingFacts.ts';

const NOT_ONE_PAIR =
	'A slope over a clade says nothing about one pair of species. It is no ground for a conservation or biosecurity decision by itself: local regulations and licensed practice decide.';
const OVERLAP_IS_LOCAL =
	'Overlap depends on the comparison area, the cell size and the models it was computed from. It is not comparable with other studies.';
const EXCHANGEABLE =
	'The test asks whether species could be exchanged among the tips. It does not set aside that near relatives often live near each other, in similar climates.';

const BY_KIND: Readonly<Record<FindingKind, readonly string[]>> = {
	signal: [
		'It does not show that niches are conserved, that they evolve slowly, or what kept them alike: a random walk along the tree gives the same pattern.',
		'The intercept is a value at age 0, outside the data; it is not the overlap of species as they part.'
	],
	'stronger-than-random-walk': [
		'It does not name a mechanism: bounded niches, slow change late in the tree, or climates that relatives share all do this.',
		'K above 1 speaks of the variables named, on this tree; overlap itself was tested against species at random.'
	],
	'one-old-divergence': [
		'It is one event, however many pairs meet at the root. It does not show that niches stayed alike through the clade.'
	],
	'within-split-only': [
		'The test that was declared is the one across the whole tree, and it found nothing. The second test may weaken a claim; it cannot raise one.'
	],
	'none-detected': [
		'A flat line fits niches that never changed as well as niches that change too fast to see. Read the mean overlap beside the slope.',
		'With few species or short branches only a strong relation can be detected.'
	],
	'rises-with-age': ['Recent species may differ and old ones converge, or geography may arrange it. The test cannot tell which.'],
	'too-few': ['With so few species no arrangement is rare enough. More species are needed, not more shuffles.']
};

/** What the result does not show, most specific first. */
export function findingLimits(kind: FindingKind, facts: FindingFacts): string[] {
	const scale = facts.transformed ? ['The slope is on the logit scale and cannot be read as overlap lost.'] : [];
	return [...BY_KIND[kind], ...scale, EXCHANGEABLE, OVERLAP_IS_LOCAL, NOT_ONE_PAIR];
}
