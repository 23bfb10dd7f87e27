import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import type { NicheVariable } from '#lib/overlap/nicheTable.ts';
import { nodeAges } from '#lib/phylogeny/nodeAges.ts';
import { pruneTree } from '#lib/phylogeny/pruneTree.ts';
import { tipIndices } from '#lib/phylogeny/tree.ts';
import type { AgedTree } from '#lib/statistics/agedTree.ts';
import { pruneTraits } from '#lib/statistics/signal/pruneTraits.ts';
import type { MeasuredTrait } from '#lib/statistics/signal/traitLikelihood.ts';
import { brownianTree } from '#lib/statistics/signal/traitTree.ts';
import { matchNames } from './names/matchNames.ts';
import type { PreparedAnalysis } from './prepareAnalysis.ts';
import { AnalysisRefusal } from './refusal.ts';

const FEWEST_VALUES = 4;

/** One variable on the tree of the species that have it. */
export type NicheTrait = Pick<NicheVariable, 'name' | 'role'> & {
	readonly tree: AgedTree;
	/** tree order */
	readonly trait: MeasuredTrait;
	/** species of the analysis that the table has no value for */
	readonly leftOut: readonly string[];
	/** standard errors are there for some species and not for others, so none is used */
	readonly errorsIncomplete: boolean;
};

/**
 * The variables whose signal a plan asks for, and those of the same table that can make overlap fall by themselves, each
 * on the tree of the species that have it.
 *
 * @returns nothing when the plan does not ask for signal
 * @throws {AnalysisRefusal} `no-niche-table`, `unknown-variable`, `too-few-values`, `constant-variable`; `zero-length-tips`
 */
export function nicheTraits(prepared: PreparedAnalysis, inputs: AnalysisInputs, plan: Plan): NicheTrait[] {
	if (plan.signal === null) return [];
	const { niches } = inputs;
	if (niches === undefined) {
		throw new AnalysisRefusal(
			'no-niche-table',
			'Signal in niche position needs a table of niche positions: bring one with the materials.'
		);
	}
	const asked = new Set(plan.signal.variables);
	const unknown = [...asked].find((name) => niches.variables.every((variable) => variable.name !== name));
	if (unknown !== undefined) {
		const has = niches.variables.map(({ name }) => name).join(', ');
		throw new AnalysisRefusal('unknown-variable', `The table “${niches.label}” has no variable “${unknown}”. It has ${has}.`);
	}
	const rowOf = rowsByTip(prepared, inputs);
	return niches.variables
		.filter(({ name, role }) => asked.has(name) || role !== 'position')
		.map((variable) => traitOf(prepared, variable, rowOf));
}

/** Which row of the niche table stands for each tip of the analysis, by the same rules as the names of the matrix. */
function rowsByTip({ species }: PreparedAnalysis, { niches, decisions }: AnalysisInputs): ReadonlyMap<string, number> {
	const named = niches?.species ?? [];
	const held = new Set(named);
	const matching = matchNames({
		tips: [...species],
		species: [...named],
		decisions: decisions.filter(({ from }) => held.has(from)).map((decision) => ({ ...decision }))
	});
	const rows = new Map(named.map((name, row) => [name, row]));
	return new Map(matching.pairs.map(({ tip, species: name }) => [tip, rows.get(name) ?? -1]));
}

function traitOf(prepared: PreparedAnalysis, variable: NicheVariable, rowOf: ReadonlyMap<string, number>): NicheTrait {
	const { name, role } = variable;
	const valueOf = (list: Float64Array, tip: string) => list[rowOf.get(tip) ?? -1] ?? Number.NaN;
	const has = prepared.species.map((tip) => Number.isFinite(valueOf(variable.values, tip)));
	const species = prepared.species.filter((_, index) => has[index]);
	const values = Float64Array.from(species, (tip) => valueOf(variable.values, tip));
	refuse(name, values);

	const tips = tipIndices(prepared.tree).filter((_, position) => has[position]);
	const pruned = pruneTree(prepared.tree, tips);
	const tree = { parent: pruned.parent, ages: nodeAges(pruned) };
	const { standardErrors } = variable;
	const errors = standardErrors === null ? null : Float64Array.from(species, (tip) => valueOf(standardErrors, tip));
	const complete = errors !== null && errors.every(Number.isFinite);
	const trait = { values, standardErrors: complete ? errors : null };
	// K reads the tree without errors, so branches of length zero are found here, before anything runs.
	pruneTraits(brownianTree(tree), values);
	const leftOut = prepared.species.filter((_, index) => !has[index]);
	return { name, role, tree, trait, leftOut, errorsIncomplete: errors !== null && !complete };
}

function refuse(name: string, values: Float64Array): void {
	if (values.length < FEWEST_VALUES) {
		throw new AnalysisRefusal(
			'too-few-values',
			`“${name}” has values for ${values.length} of the species compared; signal needs at least ${FEWEST_VALUES}. Look at the names in the table.`
		);
	}
	if (values.every((value) => value === values[0])) {
		throw new AnalysisRefusal(
			'constant-variable',
			`“${name}” is ${values[0]} for every species: a constant has no signal. Leave it out.`
		);
	}
}
