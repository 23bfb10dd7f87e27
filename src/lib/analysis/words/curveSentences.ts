import { type Measure, MEASURE_NAMES } from '#lib/contracts/measure.ts';
import type { AgeUnit } from '#lib/contracts/materials.ts';
import type { Statistic } from '#lib/contracts/plan.ts';
import type { AgeClass, FallBlock, InfluenceBlock, PowerBlock } from '#lib/contracts/resultBlocks.ts';
import type { OverlapsOfAge } from '#lib/statistics/curves/overlapsOfAge.ts';
import { formatAge, formatCount, formatFixed, formatShare, formatSlope } from './numbers.ts';
import { STATISTIC_WORDS } from './statisticWords.ts';
import { unitWords } from './units.ts';

/** How ages of one tree are written. */
export type AgeScale = { readonly ageUnit: AgeUnit; readonly rootAge: number };

export const AGE_CLASS_CAUTION =
	'The bands show where shuffled species would lie, one class at a time. They are not a test: a class outside its band is no finding by itself.';

export function ageClassSentence(classes: readonly AgeClass[], scale: AgeScale): string | null {
	const [youngest, oldest] = [classes[0], classes.at(-1)];
	if (youngest === undefined || oldest === undefined || classes.length < 2) return null;
	const outside = classes.filter(({ mean, shuffled }) => mean < shuffled[0] || mean > shuffled[2]).length;
	const spans = [youngest, oldest].map(({ from, to }) => spanOf(from, to, scale));
	const among = `${outside === 0 ? 'None' : formatCount(outside)} of the ${formatCount(classes.length)} classes of age`;
	return (
		`Mean overlap is ${formatFixed(youngest.mean, 2)} where species parted at ${spans[0]} and ${formatFixed(oldest.mean, 2)} where they ` +
		`parted at ${spans[1]}. ${among} ${outside === 1 ? 'lies' : 'lie'} outside the middle 95 % of shuffled species.`
	);
}

const SHAPE_WORDS = {
	'more-alike': 'Young pairs are more alike than that curve',
	follows: 'Young pairs follow that curve',
	'less-alike-then-level': 'Young pairs are less alike than that curve, then overlap stays level'
} as const;

/** The word that holds whatever the number of niche axes; null where it depends on them. */
export function fallWord({ fits }: Pick<FallBlock, 'fits'>): keyof typeof SHAPE_WORDS | null {
	const [first] = fits;
	return first !== undefined && fits.every(({ shape }) => shape.word === first.shape.word) ? first.shape.word : null;
}

export function fallSentence(fall: FallBlock, scale: AgeScale & { readonly youngestAge: number }): string {
	const [one, ...others] = fall.fits;
	if (one === undefined) return '';
	const rest = others.map(({ axes, halfOverlapAge }) => `${passesAt(halfOverlapAge, scale)} on ${axes}`).join(' and ');
	const word = fallWord(fall);
	const shape = word === null ? 'Whether young pairs follow that curve depends on the number of axes assumed' : SHAPE_WORDS[word];
	return (
		`The curve of niches that walk at random on one axis, fitted to these overlaps, passes one half ${passesAt(one.halfOverlapAge, scale)}` +
		` (5 to 95 %: ${rangeOf(one.range, scale)}); ${rest} axes. ${shape}.`
	);
}

/** Why no curve is drawn; null for a measure that has one, whose result is older than the curve. */
export function noFallSentence(measure: Measure): string | null {
	if (measure === 'schoener-d' || measure === 'warren-i') return null;
	return `The fall of overlap under a random walk is known for Schoener’s D and Warren’s I. These overlaps are ${MEASURE_NAMES[measure]}, so no curve is drawn.`;
}

/** “at 5.2 Ma”, or on which side of the tree it lies beyond what can be known. */
export function passesAt(age: number | null, scale: AgeScale & { readonly youngestAge: number }): string {
	const written = (value: number) => `${formatAge(value, scale.rootAge)} ${unitWords(scale.ageUnit).date}`;
	if (age === null) return `beyond the root (over ${written(scale.rootAge)})`;
	if (age < scale.youngestAge) return `before the youngest common ancestor (under ${written(scale.youngestAge)})`;
	return `at ${written(age)}`;
}

export function rangeOf([from, to]: readonly [number | null, number | null], scale: AgeScale): string {
	const root = `over ${formatAge(scale.rootAge, scale.rootAge)} ${unitWords(scale.ageUnit).date}`;
	if (from === null) return root;
	return to === null ? `from ${formatAge(from, scale.rootAge)} to ${root}` : spanOf(from, to, scale);
}

export function fallCaution({ withFloor, withCeiling }: FallBlock, scale: AgeScale & { readonly youngestAge: number }): string {
	return (
		'This describes overlaps within one comparison area and one way of modelling; it is not comparable between studies. ' +
		`Over a floor of ${formatShare(withFloor.floor)} that all pairs share, the same overlaps would pass one half ${passesAt(withFloor.halfOverlapAge, scale)}, ` +
		`under a ceiling of ${formatFixed(withCeiling.ceiling, 1)} ${passesAt(withCeiling.halfOverlapAge, scale)}; niches of unequal breadth shift it as much. ` +
		'Less alike, then level, may be a bounded walk, noise, or unequal breadth.'
	);
}

export const INFLUENCE_CAUTION =
	'This is the influence of each species, not an interval: read as a 95 % interval such slopes hold the expected one in about 77 % of cases.';

export function influenceSentence({ slopes, range, mostInfluential }: InfluenceBlock, slope: number, ageUnit: AgeUnit): string {
	const [from, to] = range.map((end) => formatSlope(end));
	const turned = slopes.filter((left) => left.slope !== null && left.slope * slope < 0).map(({ species }) => species);
	const sign =
		turned.length === 0
			? 'No single species turns its direction.'
			: `It changes direction without ${turned.length > 3 ? `any one of ${formatCount(turned.length)} species` : turned.join(', or without ')}.`;
	return (
		`With one species left out at a time, the slope over all pairs lies from ${from} to ${to} ${unitWords(ageUnit).per}; ` +
		`${mostInfluential} moves it most. ${sign}`
	);
}

export const POWER_CAUTION =
	'The walks were fixed beforehand: power at the effect that was found would only repeat p. A statistic is chosen before p is seen; use this table for the next plan.';

export function powerSentence(power: PowerBlock, statistic: Statistic): string {
	const best =
		power.recommended === statistic
			? 'No other statistic does better over all of them.'
			: `Over all of them the ${STATISTIC_WORDS[power.recommended].name} does best: ${sharesOf(power, power.recommended)}.`;
	return (
		`What this design could have detected: had niches walked at random along this tree, the ${STATISTIC_WORDS[statistic].name} would have ` +
		`found overlap falling in ${sharesOf(power, statistic)}. ${best}`
	);
}

/** The same before a plan runs, with the recommendation while it can still be followed. */
export function planPowerSentence(power: PowerBlock, statistic: Statistic): string {
	const opening = `Had niches walked at random along this tree, the ${STATISTIC_WORDS[statistic].name} would find overlap falling in ${sharesOf(power, statistic)}`;
	if (power.recommended === statistic) return `${opening}: the most of all statistics here.`;
	return `${opening}; the ${STATISTIC_WORDS[power.recommended].name} would do best, in ${sharesOf(power, power.recommended)}.`;
}

/** “62 to 74 % of cases with one niche axis and 92 to 97 % with two”. */
export function sharesOf({ truths, rows }: Pick<PowerBlock, 'truths' | 'rows'>, statistic: Statistic): string {
	const power = rows.find((row) => row.statistic === statistic)?.power ?? [];
	const [one, two] = [1, 2].map((axes) => {
		const shares = power.filter((_, i) => truths[i]?.axes === axes).map((share) => Math.round(100 * share));
		const [low, high] = [Math.min(...shares), Math.max(...shares)];
		return low === high ? `${low} %` : `${low} to ${high} %`;
	});
	return `${one} of cases with one niche axis and ${two} with two`;
}

/** What pairs of an age have shown here: for a person with one pair in mind, to whom a slope says nothing. */
export function ageWindowSentence(seen: OverlapsOfAge, from: number, to: number, scale: AgeScale): string {
	const span = spanOf(from, to, scale);
	if (seen.range === null) return `No pair here parted at ${span}: nothing is known of such pairs.`;
	const { lowest, highest } = seen.range;
	const range = lowest === highest ? formatFixed(lowest, 2) : `${formatFixed(lowest, 2)} to ${formatFixed(highest, 2)}`;
	const pairs = `${formatCount(seen.pairs)} ${seen.pairs === 1 ? 'pair' : 'pairs'}`;
	const nodes = `${formatCount(seen.nodes)} ${seen.nodes === 1 ? 'node' : 'nodes'}`;
	return `Pairs that parted at ${span}: overlap ${range}, ${pairs}, ${nodes}; no more is known.`;
}

function spanOf(from: number, to: number, { ageUnit, rootAge }: AgeScale): string {
	const [first, last] = [formatAge(from, rootAge), formatAge(to, rootAge)];
	const { date } = unitWords(ageUnit);
	return first === last ? `${first} ${date}` : `${first} to ${last} ${date}`;
}
