import type { FindingKind } from '#lib/contracts/analysisResult.ts';
import { MEASURE_NAMES } from '#lib/contracts/measure.ts';
import { STATISTIC_WORDS } from './statisticWords.ts';
import type { FindingFacts } from './findingFacts.ts';
import { formatCount, formatFixed, formatP, formatShare, formatSlope } from './numbers.ts';
import { beyondRandomWalk } from './signalSentence.ts';
import { unitWords } from './units.ts';

/** A stretch of the sentence; one with a key is a number that can be traced to where it came from. */
export type SentencePart = { readonly text: string; readonly key?: 'slope' | 'p' | 'within' | 'species' | 'shuffles' };

/** The one or two sentences under the title, with the numbers in them. */
export function findingSentence(kind: FindingKind, facts: FindingFacts): { sentence: string; parts: SentencePart[] } {
	const parts = [...opening(facts), ...shuffleSentence(facts), ...closing(kind, facts)];
	return { sentence: parts.map((part) => part.text).join(''), parts };
}

function opening(facts: FindingFacts): SentencePart[] {
	const measure = MEASURE_NAMES[facts.measure];
	const scale = facts.transformed ? ' (logit scale)' : '';
	const direction = facts.slope < 0 ? 'lower' : 'higher';
	return [
		{ text: 'Among ' },
		{ text: `${formatCount(facts.species)} species`, key: 'species' },
		{ text: `, ${measure}${scale} is ${direction} by ` },
		{ text: formatSlope(Math.abs(facts.slope)), key: 'slope' },
		{ text: ` ${unitWords(facts.ageUnit).forEach}. ` }
	];
}

function shuffleSentence(facts: FindingFacts): SentencePart[] {
	const { permutation } = facts;
	const averaged = facts.trees === undefined ? '' : `, averaged over ${formatCount(facts.trees.count)} trees`;
	const verb = `${STATISTIC_WORDS[permutation.statistic].asExtreme[facts.alternative]}${averaged}`;
	if (permutation.exact) {
		const count = `${formatCount(permutation.asExtreme)} of all ${formatCount(permutation.count)}`;
		return [
			{ text: count, key: 'shuffles' },
			{ text: ` relabellings of the species ${verb}, the one observed included (` },
			{ text: `p ${formatP(permutation.p, null)}`, key: 'p' },
			{ text: '). ' }
		];
	}
	const shuffles = formatCount(permutation.count);
	const count =
		permutation.asExtreme === 0
			? `None of ${shuffles} shuffles`
			: `${formatCount(permutation.asExtreme)} of ${shuffles} shuffles`;
	return [
		{ text: count, key: 'shuffles' },
		{ text: ` of the species ${verb} (` },
		{ text: `p ${formatP(permutation.p, 1 / (permutation.count + 1))}`, key: 'p' },
		{ text: '). ' }
	];
}

function closing(kind: FindingKind, facts: FindingFacts): SentencePart[] {
	const within = facts.permutation.withinDeepestSplit;
	const withinP: SentencePart[] =
		within === null
			? []
			: [
					{
						text: `p ${formatP(facts.alternative === 'less' ? within.pLess : within.pTwoSided, within.exact ? null : 1 / (within.count + 1))}`,
						key: 'within'
					}
				];
	switch (kind) {
		case 'stronger-than-random-walk':
			return [
				{
					text: `This is phylogenetic signal in niche overlap; in ${listed(facts.signal === undefined ? [] : beyondRandomWalk(facts.signal, facts.alpha))} relatives are nearer than a random walk along the tree would leave them. What held them together is not told.`
				}
			];
		case 'signal':
			return [{ text: 'This is phylogenetic signal in niche overlap; it is not yet evidence that niches were held back.' }];
		case 'one-old-divergence':
			return [
				{ text: 'When species are shuffled only within the two sides of the root, the fall is no more than chance gives (' },
				...withinP,
				{ text: '): one old divergence explains this.' }
			];
		case 'within-split-only':
			return [
				{ text: 'There is no detectable relation across the whole tree; within the sides of the root overlap falls with age (' },
				...withinP,
				{ text: ').' }
			];
		case 'rises-with-age':
			return [{ text: 'Older pairs overlap more than younger ones. Why is a question this test cannot answer.' }];
		case 'too-few':
			return [
				{
					text: `The smallest p that this tree can give is ${formatFixed(facts.permutation.smallestP, 3)}, above ${facts.alpha}: no result could have counted.`
				}
			];
		case 'none-detected':
			return [{ text: `No relation was detected. That is not evidence that there is none.${detectable(facts)}` }];
	}
}

/** What this design could have detected: fixed beforehand, never the effect that was found. */
function detectable({ power, permutation }: FindingFacts): string {
	const row = power?.rows.find(({ statistic }) => statistic === permutation.statistic);
	if (power === undefined || row === undefined) return '';
	const [least, most] = [Math.min(...row.power), Math.max(...row.power)];
	return ` Had niches taken a random walk along this tree, this test would have found it in ${formatShare(least)} to ${formatShare(most)} of cases, by how fast and on how many axes they moved.`;
}

function listed(names: readonly string[]): string {
	const last = names.at(-1) ?? 'niche position';
	return names.length < 2 ? last : `${names.slice(0, -1).join(', ')} and ${last}`;
}
