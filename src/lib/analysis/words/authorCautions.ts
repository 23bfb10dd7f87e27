import type { Finding } from '#lib/contracts/analysisResult.ts';
import type { FindingFacts } from './findingFacts.ts';
import { formatCount, formatShare } from './numbers.ts';

type Caution = Finding['cautions'][number];
type Rule = (facts: FindingFacts) => Caution | null;

/** A tree with fewer of the clade's species than this makes the nearest relatives look older than they are. Common practice. */
const COMPLETE_SHARE = 0.75;

const rules: readonly Rule[] = [
	({ about, species }) => {
		if (about === undefined) return null;
		if (about.speciesInClade === null) {
			return {
				code: 'sampling-unknown',
				message:
					'How many living species the clade has is not recorded: missing sister species make the youngest pairs look older. Say it with the tree.'
			};
		}
		const share = species / about.speciesInClade;
		return share >= COMPLETE_SHARE
			? null
			: {
					code: 'sampling',
					message: `${formatCount(species)} of ${formatCount(about.speciesInClade)} living species (${formatShare(share)}) are compared: the nearest relatives here may not be nearest relatives, and the youngest pairs look older than they are.`
				};
	},
	({ about }) => {
		if (about?.placement !== 'some-placed') return null;
		const count = about.placedTips.length;
		const which = count === 0 ? 'Some tips were' : count === 1 ? 'One tip was' : `${formatCount(count)} tips were`;
		return {
			code: 'placed-tips',
			message: `${which} placed by taxonomy, not by sequences: their ages follow the classification, which may follow the niche. Run again without them.`
		};
	}
];

/** Pitfalls that only the author of the tree can know of. */
export function authorCautions(facts: FindingFacts): Caution[] {
	return rules.map((rule) => rule(facts)).filter((caution) => caution !== null);
}
