import type { AnalysisInputs, CovariateInput } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { fewestToLeaveOut } from '#lib/overlap/fewestToLeaveOut.ts';
import { selectSpecies, type PairMatrix } from '#lib/overlap/pairMatrix.ts';
import { mrcaAges } from '#lib/phylogeny/mrcaAges.ts';
import { lowerTriangle, symmetricMatrix } from '#lib/statistics/pairValues.ts';
import { covariateDesign, type CovariateDesign } from '#lib/statistics/covariates/covariateDesign.ts';
import { matchNames } from '../names/matchNames.ts';
import type { PreparedAnalysis } from '../prepareAnalysis.ts';
import { AnalysisRefusal } from '../refusal.ts';

/** Names listed in a sentence before the rest is counted. */
const NAMED = 5;

/**
 * Overlap on age and the covariates that a plan allows for, over the species of the analysis. Age stands on the scale of
 * the statistic that the plan is judged by: its logarithm for the slope on log age, plain for every other.
 *
 * @returns null when the plan allows for nothing
 * @throws {AnalysisRefusal} an open remark's code, `covariate-species`, `missing-pairs`; {InputError} those of `covariateDesign`
 */
export function plannedCovariates(prepared: PreparedAnalysis, inputs: AnalysisInputs, plan: Plan): CovariateDesign | null {
	if (plan.covariates.length === 0) return null;
	const { covariates } = inputs;
	if (covariates === undefined) throw new Error('A plan with covariates needs their values.');
	const { tree, ages, species, response } = prepared;
	const pairAges = lowerTriangle(mrcaAges(tree, ages), species.length);
	return covariateDesign({
		overlaps: lowerTriangle(response, species.length),
		ages: { name: 'age', values: ageScaleOf(plan) === 'log2' ? pairAges.map(Math.log2) : pairAges },
		covariates: covariates.map((covariate) => ({
			name: covariate.label,
			values: lowerTriangle(valuesOf(covariate, prepared, inputs), species.length)
		})),
		tipCount: species.length
	});
}

export function ageScaleOf({ statistic }: Plan): 'plain' | 'log2' {
	return statistic === 'slope-log-age' ? 'log2' : 'plain';
}

/** Shape (n, n), tree order. */
function valuesOf(covariate: CovariateInput, prepared: PreparedAnalysis, inputs: AnalysisInputs): Float64Array {
	const open = covariate.remarks.filter(({ level }) => level === 'settle');
	if (open[0] !== undefined) throw new AnalysisRefusal(open[0].code, `“${covariate.label}”: ${open[0].message}`, open);
	const rowOf = rowsByTip(covariate, prepared, inputs);
	const absent = prepared.species.filter((tip) => !rowOf.has(tip));
	if (absent.length > 0) throw withoutSpecies(covariate, absent);
	const whole = {
		species: covariate.species,
		values: symmetricMatrix(covariate.lower, covariate.species.length, 0)
	};
	const matrix = selectSpecies(
		whole,
		prepared.species.map((tip) => rowOf.get(tip) ?? tip)
	);
	refuseMissing(covariate, matrix);
	return matrix.values;
}

/**
 * Which species of the covariate stands for each tip: by the same rules as the names of the matrix, and by the name that
 * the matrix has for the tip, so that one decision serves both.
 */
function rowsByTip(
	covariate: CovariateInput,
	{ species }: PreparedAnalysis,
	{ overlap, decisions }: AnalysisInputs
): ReadonlyMap<string, string> {
	const matched = (names: readonly string[]) => {
		const held = new Set(names);
		const about = decisions.filter(({ from }) => held.has(from)).map((decision) => ({ ...decision }));
		return matchNames({ tips: [...species], species: [...names], decisions: about }).pairs;
	};
	const held = new Set(covariate.species);
	const byMatrix = matched(overlap.species).filter(({ species: name }) => held.has(name));
	return new Map([...byMatrix, ...matched(covariate.species)].map(({ tip, species: name }) => [tip, name]));
}

function withoutSpecies({ label }: CovariateInput, absent: readonly string[]): AnalysisRefusal {
	const more = absent.length > NAMED ? `, and ${absent.length - NAMED} more` : '';
	const named = `${absent.slice(0, NAMED).join(', ')}${more}`;
	const message = `“${label}” has no values for ${absent.length === 1 ? 'one' : absent.length} of the species compared: ${named}. Name the species in the plan without ${absent.length === 1 ? 'it' : 'them'}, correct the names, or bring the missing values.`;
	return new AnalysisRefusal('covariate-species', message, [{ level: 'settle', code: 'covariate-species', message }]);
}

function refuseMissing({ label }: CovariateInput, matrix: PairMatrix): void {
	const count = matrix.values.reduce((sum, value) => sum + (Number.isNaN(value) ? 1 : 0), 0) / 2;
	if (count === 0) return;
	const { species } = fewestToLeaveOut(matrix);
	throw new AnalysisRefusal(
		'missing-pairs',
		`${count} pair${count === 1 ? ' has' : 's have'} no value in “${label}”. An analysis needs every pair: leave out ${species.join(', ')}, or bring the missing values.`,
		[{ level: 'settle', code: 'missing-pairs', message: `Leave out: ${species.join(', ')}.` }]
	);
}
