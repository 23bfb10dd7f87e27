import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { ALL_DIAMONDS_UP_TO, DOTS_AT_MOST, drawnAverage, LARGEST_DIAMONDS } from '#lib/contracts/drawnPlate.ts';
import { MEASURE_NAMES } from '#lib/contracts/measure.ts';
import { formatCount, formatFixed, formatP, formatSlope } from './numbers.ts';
import { unitWords } from './units.ts';

/** The caption written for a plate: what each panel shows, then the numbers a reader needs to judge it. */
export function writeCaption(result: AnalysisResult): string {
	return [panels(result), numbers(result), notes(result)].filter((text) => text !== '').join(' ');
}

function panels(result: AnalysisResult): string {
	const measure = MEASURE_NAMES[result.compared.measure];
	return [
		`Niche overlap and shared ancestry in ${formatCount(result.species)} species.`,
		`(a) ${measure} of every pair, folded against the names.`,
		`(b) Dated tree; ${ageWords(result)}.`,
		'(c) All overlaps; its colours are the key to a and d.',
		`(d) Overlap against age of the most recent common ancestor, one column of pairs under each node${stripWords(result)}; ${diamondWords(result)};`,
		'coloured line, all pairs; dashed, node means; grey lines, all pairs after shuffling the species among the tips.',
		endsWords(result)
	].join(' ');
}

function stripWords({ nodeAverages }: AnalysisResult): string {
	const any = nodeAverages.nodes.some(({ pairs }) => pairs > DOTS_AT_MOST);
	return any ? ' (strips: width by the square root of the number of pairs)' : '';
}

function diamondWords(result: AnalysisResult): string {
	const { nodes } = result.nodeAverages;
	const which = nodes.length > ALL_DIAMONDS_UP_TO ? `the ${LARGEST_DIAMONDS} nodes with most pairs` : 'a node';
	const how = { nested: 'weighted by branching', plain: 'every pair equal' }[drawnAverage(result)];
	return `diamonds, means across ${which} (${how})`;
}

function endsWords({ permutation }: AnalysisResult): string {
	const lines = permutation.exact ? `the lines of all ${formatCount(permutation.count)} relabellings` : 'the shuffled lines';
	return `(e) Where ${lines} end at the root, and where the observed line does.`;
}

function ageWords(result: AnalysisResult): string {
	const { ageUnit } = result.compared;
	if (ageUnit === 'Ma') return 'ages in Ma, million years before the present';
	return ageUnit === 'ka' ? 'ages in ka, thousand years before the present' : 'ages relative';
}

function numbers(result: AnalysisResult): string {
	const { permutation, regression } = result;
	const floor = permutation.exact ? null : 1 / (permutation.count + 1);
	const how = permutation.exact
		? `all ${formatCount(permutation.count)} relabellings`
		: `${formatCount(permutation.count)} shuffles of species labels, seed ${result.engine.seed}`;
	const within = permutation.withinDeepestSplit;
	const tail = { less: 'one-sided, falls', greater: 'one-sided, rises', 'two-sided': 'two-sided' }[result.compared.alternative];
	const withinText =
		within === null
			? ''
			: ` Within the deepest split p ${formatP(tailP(within, result.compared.alternative), within.exact ? null : 1 / (within.count + 1))}.`;
	return (
		`Slope ${formatSlope(regression.slope)} ${unitWords(result.compared.ageUnit).per}, r = ${formatFixed(regression.r, 2)}; ` +
		`p ${formatP(permutation.p, floor)} (${tail}; ${how}).${withinText} ` +
		`${formatCount(result.species)} species, ${formatCount(result.pairs)} pairs, ${formatCount(result.nodeAverages.nodes.length)} nodes.`
	);
}

function tailP(
	tails: { pLess: number; pGreater: number; pTwoSided: number },
	alternative: 'less' | 'greater' | 'two-sided'
): number {
	return alternative === 'less' ? tails.pLess : alternative === 'greater' ? tails.pGreater : tails.pTwoSided;
}

function notes(result: AnalysisResult): string {
	const lines: string[] = [];
	if (result.trees !== undefined) lines.push(treesNote(result.trees, result.compared.tree));
	if (result.dropped.length > 0) lines.push(`Left out: ${result.dropped.map((entry) => entry.name).join(', ')}.`);
	if (result.compared.polytomies > 0) lines.push(`Unresolved nodes: ${result.compared.polytomies}.`);
	if (result.compared.levelled) lines.push('Tips were levelled by extending terminal branches.');
	if (result.clades?.some(({ holds, node }) => holds && node !== null)) {
		lines.push(
			'Brackets on the tree and outlines on the wing: clades more alike inside than with the other species, and than with the rest of the clade that contains them, each adjusted for all clades asked about.'
		);
	}
	if (result.compared.transform === 'logit') lines.push('Overlap on the logit scale.');
	return lines.join(' ');
}

function treesNote({ count }: { count: number }, { index, name }: AnalysisResult['compared']['tree']): string {
	const drawn = name === '' ? `tree ${index + 1} of the set` : `tree “${name}”`;
	return (
		`The test averages over ${formatCount(count)} trees; drawn are ${drawn}, its line and its shuffles. ` +
		'Bars in b, the middle 95 % of the ages of a clade over the trees; fine coloured lines in d, single trees.'
	);
}
