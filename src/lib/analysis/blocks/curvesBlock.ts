import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { ageClasses } from '#lib/statistics/curves/ageClasses.ts';
import { describeFall } from '#lib/statistics/curves/describeFall.ts';
import { leaveOneOutSlopes } from '#lib/statistics/curves/leaveOneOut.ts';
import { STREAM_DOMAIN } from '#lib/statistics/randomStream.ts';
import { simulatedSpecies } from '../simulatedSpecies.ts';
import type { BlockContext } from './blockContext.ts';

/** Mean overlap by age of the common ancestor, on the scale of the test, with bands from the first of its shuffles. */
export function ageClassesBlock({ plan, prepared, design }: BlockContext): Pick<AnalysisResult, 'ageClasses'> {
	const { layout, shape, free: groups, tipCount } = design;
	const ages = Float64Array.from(shape.internal, (node) => prepared.ages[node] ?? 0);
	const { seed, permutations } = plan;
	const question = { tipCount, groups, domain: STREAM_DOMAIN.free, seed, permutations };
	const classes = ageClasses({ layout, overlap: prepared.response, tipCount }, ages, question);
	return { ageClasses: classes.map(({ shuffled: [low, middle, high], ...row }) => ({ ...row, shuffled: [low, middle, high] })) };
}

/** Overlaps beside a random walk of niche centres; only D and I have the curve, and always on the scale of overlap. */
export function fallBlock({ inputs, plan, prepared }: BlockContext): Pick<AnalysisResult, 'fall'> {
	const { measure } = inputs;
	if (measure !== 'schoener-d' && measure !== 'warren-i') return {};
	const { tree, ages, overlap, species } = simulatedSpecies(prepared);
	const fall = describeFall({ measure, tree: { parent: tree.parent, ages }, overlap, seed: plan.seed });
	return {
		fall: {
			...fall,
			fits: fall.fits.map(({ range: [from, to], curve, ...fit }) => ({
				...fit,
				range: [from, to],
				curve: curve.map(([age, value]) => [age, value])
			})),
			speciesSimulated: species.length
		}
	};
}

/** The slope over all pairs without each species in turn. */
export function influenceBlock({ prepared, pairAges, regression }: BlockContext): Pick<AnalysisResult, 'influence'> {
	const { species, response } = prepared;
	const left = leaveOneOutSlopes(pairAges, response, species.length);
	const slopes = species.map((name, i) => ({ species: name, slope: left[i] ?? null }));
	const defined = slopes.flatMap(({ species: name, slope }) => (slope === null ? [] : [{ species: name, slope }]));
	const [first] = defined;
	if (first === undefined) return {};
	const shift = ({ slope }: { slope: number }) => Math.abs(slope - regression.slope);
	const most = defined.reduce((held, next) => (shift(next) > shift(held) ? next : held), first);
	const values = defined.map(({ slope }) => slope);
	return { influence: { slopes, range: [Math.min(...values), Math.max(...values)], mostInfluential: most.species } };
}
