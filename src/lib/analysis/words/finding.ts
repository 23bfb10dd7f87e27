import type { Finding, FindingKind } from '#lib/contracts/analysisResult.ts';
import { findCautions } from './cautions.ts';
import type { FindingFacts } from './findingFacts.ts';
import { findingLimits } from './limits.ts';
import { beyondRandomWalk } from './signalSentence.ts';
import { findingSentence } from './sentence.ts';

const TITLES: Readonly<Record<FindingKind, string>> = {
	signal: 'Overlap falls with age more than chance allows',
	'stronger-than-random-walk': 'Overlap falls with age, and relatives are nearer than a random walk would leave them',
	'one-old-divergence': 'One old divergence explains the fall',
	'within-split-only': 'No relation across the whole tree; within the two sides of the root, overlap falls',
	'none-detected': 'No detectable relation between overlap and age',
	'rises-with-age': 'Overlap rises with age',
	'too-few': 'Too few species to say'
};

/**
 * The finding a result licenses: title, sentence, limits and cautions. The claim follows the table of
 * docs/decisions/0006-claims.md and never exceeds it; the ordinary test decides, and the test within the deepest split may only weaken it.
 */
export function findFinding(facts: FindingFacts): Finding {
	const kind = findingKind(facts);
	return {
		kind,
		title: TITLES[kind],
		...findingSentence(kind, facts),
		limits: findingLimits(kind, facts),
		cautions: findCautions(kind, facts)
	};
}

export function findingKind(facts: FindingFacts): FindingKind {
	const { permutation, alpha, alternative, slope, signal } = facts;
	if (permutation.smallestP > alpha) return 'too-few';
	const falls = permutation.observed < 0;
	const decisive = alternative === 'less' ? permutation.pLess : permutation.pTwoSided;

	if (!falls && permutation.pTwoSided <= alpha) return 'rises-with-age';
	if (alternative === 'greater') return 'none-detected';
	if (falls && decisive <= alpha) {
		const within = permutation.withinDeepestSplit;
		const couldSpeak = within !== null && within.smallestP <= alpha;
		if (couldSpeak && tailOf(within, alternative) > alpha) return 'one-old-divergence';
		return signal !== undefined && beyondRandomWalk(signal, alpha).length > 0 ? 'stronger-than-random-walk' : 'signal';
	}
	const within = permutation.withinDeepestSplit;
	// A rise over the whole tree cannot be read as a fall: the restricted test may weaken a claim, never raise it.
	if (within !== null && slope <= 0 && within.pLess <= within.pGreater && tailOf(within, alternative) <= alpha)
		return 'within-split-only';
	return 'none-detected';
}

function tailOf(tails: { pLess: number; pTwoSided: number }, alternative: 'less' | 'two-sided'): number {
	return alternative === 'less' ? tails.pLess : tails.pTwoSided;
}
