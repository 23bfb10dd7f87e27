import type { Finding, FindingKind } from '#lib/contracts/analysisResult.ts';
import { authorCautions } from './authorCautions.ts';
import type { FindingFacts } from './findingFacts.ts';
import { formatAge, formatCount, formatFixed, formatShare } from './numbers.ts';
import { companionCautions } from './signalSentence.ts';
import { treeCautions } from './treeCautions.ts';
import { unitWords } from './units.ts';

type Caution = Finding['cautions'][number];
type Rule = (facts: FindingFacts, kind: FindingKind) => Caution | null;

/** Above this share of pairs at the root, one old split carries much of the slope. Common practice. */
const ROOT_SHARE_TO_MENTION = 0.2;
/** A side this small beside a large one acts as an outgroup. Common practice. */
const OUTGROUP_SIZE = 2;
const HIGH_OVERLAP = 0.9;
const LOW_OVERLAP = 0.05;
/** Crown ages outside this range in Ma suggest another unit. Common practice, from memory. */
const USUAL_ROOT_MA = { from: 0.001, to: 200 } as const;
const SUSPICIOUS_R = 0.8;
/** Closed-form and shuffled p should not differ by more than this many standard errors plus a margin for discreteness. */
const MOMENT_TOLERANCE = 0.03;

const rules: readonly Rule[] = [
	({ permutation: { withinDeepestSplit: within } }) =>
		within !== null && within.rootPairShare >= ROOT_SHARE_TO_MENTION
			? {
					code: 'root-pairs',
					message: `${formatShare(within.rootPairShare)} of all pairs meet at the root: one old split weighs much. The p within the deepest split sets it aside.`
				}
			: null,
	({ permutation: { withinDeepestSplit: within }, species }) => {
		const smallest = within === null ? 1 : Math.min(...within.sides);
		return smallest <= OUTGROUP_SIZE && species > 3 * OUTGROUP_SIZE
			? {
					code: 'outgroup',
					message: `One side of the root holds ${smallest === 1 ? 'a single species' : `${smallest} species`}: it adds its pairs at the greatest age and pulls on the line. Run again without it.`
				}
			: null;
	},
	({ permutation: { withinDeepestSplit: within }, alpha }) =>
		within === null
			? {
					code: 'split-untestable',
					message: 'No side of the root holds two species or more, so the test within the deepest split cannot be made.'
				}
			: within.smallestP > alpha
				? {
						code: 'split-untestable',
						message: `Within the deepest split the smallest attainable p is ${formatFixed(within.smallestP, 3)}: that test could not have spoken.`
					}
				: null,
	({ permutation, alpha }) =>
		permutation.interval !== null && permutation.interval[0] < alpha && permutation.interval[1] > alpha
			? {
					code: 'undecided',
					message: `Undecided at ${alpha}: the Monte Carlo interval of p, ${formatFixed(permutation.interval[0], 4)} to ${formatFixed(permutation.interval[1], 4)}, lies on both sides of it. Ask for more shuffles.`
				}
			: null,
	({ permutation, alpha }) =>
		permutation.smallestP <= alpha && permutation.smallestP > alpha / 5
			? {
					code: 'attainable-p',
					message: `The smallest p this tree can give is ${formatFixed(permutation.smallestP, 4)}: there is little room below ${alpha}.`
				}
			: null,
	({ permutation, species }) =>
		permutation.distinctAges < species - 1
			? {
					code: 'tied-ages',
					message: `The pairs have ${formatCount(permutation.distinctAges)} different ages where ${formatCount(species - 1)} nodes are possible: unresolved or equal ages carry less information.`
				}
			: null,
	({ meanOverlap }) =>
		meanOverlap > HIGH_OVERLAP
			? {
					code: 'all-high',
					message: `Mean overlap is ${formatFixed(meanOverlap, 2)}: nearly all species look alike. A large area, a floor of low suitability or smooth models can do this.`
				}
			: null,
	({ meanOverlap }) =>
		meanOverlap < LOW_OVERLAP
			? {
					code: 'all-low',
					message: `Mean overlap is ${formatFixed(meanOverlap, 3)}: ranges barely share cells, or the grids do not line up.`
				}
			: null,
	({ ageUnit }) =>
		ageUnit === 'relative'
			? {
					code: 'undated',
					message: 'The tree has relative ages: the slope has no meaning in years, and p rests on relative ages being right.'
				}
			: null,
	({ ageUnit, rootAge }) =>
		ageUnit === 'Ma' && (rootAge > USUAL_ROOT_MA.to || rootAge < USUAL_ROOT_MA.from)
			? {
					code: 'unit-of-age',
					message: `The root is ${formatAge(rootAge, rootAge)} Ma old, unusual for a clade of related species. Check the unit of the tree.`
				}
			: null,
	({ ageUnit, nodeAges }) => {
		const young = ageUnit === 'Ma' ? nodeAges.filter((age) => age < 1).length : 0;
		return young > 0
			? {
					code: 'young-nodes',
					message: `${young === 1 ? 'One node is' : `${formatCount(young)} nodes are`} younger than 1 Ma, where gene ages can be well above the ages of the split.`
				}
			: null;
	},
	({ r, species }) =>
		Math.abs(r) > SUSPICIOUS_R && species > 8
			? {
					code: 'very-strong',
					message: `r is ${formatFixed(r, 2)}, rarely seen in real clades. Were the overlaps made from the tree, or is the tree two distant clades?`
				}
			: null,
	({ momentP, permutation, alternative }) =>
		momentP !== null &&
		alternative === 'less' &&
		permutation.statistic === 'slope' &&
		Math.abs(momentP - permutation.pLess) > MOMENT_TOLERANCE
			? {
					code: 'moments-disagree',
					message: `The closed-form approximation gives p = ${formatFixed(momentP, 3)}, the shuffles ${formatFixed(permutation.pLess, 3)}: the distribution is lumpy; trust the shuffles.`
				}
			: null,
	({ polytomies }) =>
		polytomies > 0
			? {
					code: 'polytomies',
					message: `${polytomies === 1 ? 'One node is' : `${formatCount(polytomies)} nodes are`} unresolved; pairs across it share one age, as the tree says.`
				}
			: null,
	({ alternative }, kind) =>
		kind === 'rises-with-age' && alternative === 'less'
			? { code: 'other-direction', message: 'The plan asked whether overlap falls. The rise is read from the two-sided p only.' }
			: null,
	({ permutation: { p, pAdjusted, also }, alpha }) =>
		pAdjusted !== undefined && p <= alpha && pAdjusted > alpha
			? {
					code: 'adjusted-above-level',
					message: `Adjusted for the ${formatCount((also?.length ?? 0) + 1)} statistics that were declared, p is ${formatFixed(pAdjusted, 3)}, above ${alpha}: the finding hangs on which of them is read.`
				}
			: null,
	({ permutation, ageUnit }) =>
		permutation.statistic === 'slope'
			? null
			: {
					code: 'judged-by-other',
					message: `Judged by another statistic than the slope ${unitWords(ageUnit).per} that is shown; both belong to the same shuffles.`
				}
];

/** A caution for every pitfall that is present in these data. */
export function findCautions(kind: FindingKind, facts: FindingFacts): Caution[] {
	const ofTest = rules.map((rule) => rule(facts, kind)).filter((caution): caution is Caution => caution !== null);
	const companions = facts.signal === undefined ? [] : companionCautions(facts.signal, facts.alpha);
	return [...ofTest, ...companions, ...treeCautions(facts), ...authorCautions(facts)];
}
