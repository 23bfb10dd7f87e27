import type { CladeRow, CladeTestBlock, SistersBlock } from '#lib/contracts/resultBlocks.ts';
import { formatCount, formatFixed } from './numbers.ts';

export type CladesTold = {
	readonly clades: readonly Pick<CladeRow, 'label' | 'pAdjusted' | 'testable' | 'holds'>[];
	readonly test: Pick<CladeTestBlock, 'minTips'>;
	readonly alpha: number;
};

/** Names listed in the sentence before the rest is counted. */
const NAMED = 4;

/** What the clades say, counted and named; no claim beyond what holds after both adjustments. */
export function cladeSentence({ clades, test, alpha }: CladesTold): string {
	const asked = `Of ${formatCount(clades.length)} ${test.minTips === null ? 'declared ' : ''}${clades.length === 1 ? 'clade' : 'clades'}${test.minTips === null ? '' : ` of at least ${formatCount(test.minTips)} species`}`;
	const holding = clades.filter(({ holds }) => holds);
	const forParent = clades.filter(({ holds, pAdjusted }) => !holds && pAdjusted <= alpha).length;
	const small = clades.filter(({ testable }) => !testable).length;
	const sentences = [
		holding.length === 0
			? `${asked}, none is more alike inside than with the rest of the clade that contains it.`
			: `${asked}, ${formatCount(holding.length)} ${holding.length === 1 ? 'is' : 'are'} more alike inside than with the other species, and than with the rest of the clade that contains ${holding.length === 1 ? 'it' : 'them'}: ${named(holding)}.`
	];
	if (forParent > 0) {
		sentences.push(
			`${formatCount(forParent)} ${holding.length > 0 ? 'more ' : ''}${forParent === 1 ? 'differs' : 'differ'} from all other species, but not shown beyond the clade that contains ${forParent === 1 ? 'it' : 'them'}.`
		);
	}
	if (small > 0) sentences.push(`${formatCount(small)} could not have a small p, whatever the data: too few species.`);
	return sentences.join(' ');
}

/** What stands beside the clades wherever they are told. */
export const CLADE_CAUTION =
	'A clade inside an alike clade looks alike for the sake of the larger one, so only what holds beyond the clade above is marked. ' +
	'The adjusted p-values among all species hold if no species differs from another; being more alike says nothing of the cause.';

/** Sister species beside the rest: described, never tested. */
export function sisterSentence({ cherries, meanCherries, others, meanOthers }: SistersBlock): string {
	const pairs =
		cherries === 1 ? 'One pair of sister species overlaps' : `${formatCount(cherries)} pairs of sister species overlap`;
	const average = cherries === 1 ? '' : ' on average';
	return (
		`${pairs} ${formatFixed(meanCherries, 2)}${average}, the other ${formatCount(others)} pairs ${formatFixed(meanOthers, 2)}. ` +
		'Sisters are the youngest pairs, so this is the relation with age told again and no further evidence.'
	);
}

function named(clades: readonly { readonly label: string }[]): string {
	const names = clades.slice(0, NAMED).map(({ label }) => label);
	return clades.length > NAMED ? `${names.join(', ')} and ${formatCount(clades.length - NAMED)} more` : names.join(', ');
}
