import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { fewestToLeaveOut } from '#lib/overlap/fewestToLeaveOut.ts';
import { selectSpecies, type PairMatrix } from '#lib/overlap/pairMatrix.ts';
import { nodeAges } from '#lib/phylogeny/nodeAges.ts';
import { pruneTree } from '#lib/phylogeny/pruneTree.ts';
import { tipIndices, tipLabels, type Tree } from '#lib/phylogeny/tree.ts';
import { isStar } from '#lib/phylogeny/treeShape.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import { symmetricMatrix } from '#lib/statistics/pairValues.ts';
import { chooseTree, type ChosenTree } from './chooseTree.ts';
import { logitOverlap } from './logitOverlap.ts';
import { outgroupRemarks, outgroupSide, type OutgroupSide } from './outgroupSide.ts';
import { AnalysisRefusal } from './refusal.ts';
import { sharedSpecies, type Dropped } from './sharedSpecies.ts';

/** With fewer species no arrangement can be rare. */
export const FEWEST_SPECIES = 4;
const MOST_SPECIES = 2000;

/** Tree and overlaps made to agree: the same species, in tree order, every pair present. */
export type PreparedAnalysis = {
	readonly chosen: ChosenTree;
	/** the tree of the shared species; ages of its nodes */
	readonly tree: Tree;
	readonly ages: Float64Array;
	/** tip labels in tree order */
	readonly species: readonly string[];
	/** shape (n, n), row-major, tree order, diagonal 1; as imported */
	readonly overlap: Float64Array;
	/** what the statistics run on: the overlaps, transformed when the plan says so */
	readonly response: Float64Array;
	readonly dropped: readonly Dropped[];
	/** a small side of the root that holds many of the pairs */
	readonly outgroup: OutgroupSide | null;
	readonly remarks: readonly Remark[];
};

/**
 * Joins the materials of an analysis, or says in one sentence why they do not allow it.
 * @throws {AnalysisRefusal} an open remark's code, what `chooseTree` refuses, `too-few-species`, `too-many-species`, `missing-pairs`, `star-tree`
 */
export function prepareAnalysis(inputs: AnalysisInputs, plan: Plan): PreparedAnalysis {
	refuseUnsettled(inputs.overlap.remarks);
	const chosen = chooseTree(inputs, plan);
	const { pairs, dropped, remarks } = sharedSpecies({
		tips: tipLabels(chosen.tree),
		species: inputs.overlap.species,
		decisions: inputs.decisions,
		asked: plan.species
	});
	refuseSize(pairs.length);

	const tipOf = new Map(pairs.map(({ tip, species }) => [tip, species]));
	const kept = tipIndices(chosen.tree).filter((node) => tipOf.has(chosen.tree.label[node] ?? ''));
	const tree = pruneTree(chosen.tree, kept);
	const species = tipLabels(tree);
	if (isStar(tree)) {
		throw new AnalysisRefusal(
			'star-tree',
			'All pairs of the shared species have the same common ancestor age (a star): nothing can be regressed on age. Bring a resolved tree.'
		);
	}
	const whole: PairMatrix = {
		species: inputs.overlap.species,
		values: symmetricMatrix(inputs.overlap.lower, inputs.overlap.species.length, 1)
	};
	const matrix = selectSpecies(
		whole,
		species.map((tip) => tipOf.get(tip) ?? tip)
	);
	refuseMissing(matrix);
	const overlap = matrix.values;
	const ages = nodeAges(tree);
	const outgroup = outgroupSide({ tree, ages, species, fewest: FEWEST_SPECIES });
	return {
		chosen,
		tree,
		ages,
		species,
		overlap,
		response: plan.transform === 'logit' ? logitOverlap(overlap, species.length) : overlap,
		dropped,
		outgroup,
		remarks: [...chosen.remarks, ...inputs.overlap.remarks, ...remarks, ...outgroupRemarks(outgroup)]
	};
}

function refuseUnsettled(remarks: readonly Remark[]): void {
	const open = remarks.filter(({ level }) => level === 'settle');
	const [first] = open;
	if (first !== undefined) throw new AnalysisRefusal(first.code, first.message, open);
}

function refuseSize(count: number): void {
	if (count < FEWEST_SPECIES) {
		throw new AnalysisRefusal(
			'too-few-species',
			`Expected at least ${FEWEST_SPECIES} species shared by tree and matrix; ${count === 1 ? 'there is 1' : `there are ${count}`}. Look at the names: ${FEWEST_SPECIES} must agree.`
		);
	}
	if (count > MOST_SPECIES) {
		throw new AnalysisRefusal(
			'too-many-species',
			`An analysis takes up to 2,000 species; tree and matrix share ${count}. Choose some of them.`
		);
	}
}

function refuseMissing(matrix: PairMatrix): void {
	const count = matrix.values.reduce((sum, value) => sum + (Number.isNaN(value) ? 1 : 0), 0) / 2;
	if (count === 0) return;
	const { species } = fewestToLeaveOut(matrix);
	throw new AnalysisRefusal(
		'missing-pairs',
		`${count} pair${count === 1 ? ' has' : 's have'} no overlap. An analysis needs every pair: leave out ${species.join(', ')}, or bring the missing values.`,
		[{ level: 'settle', code: 'missing-pairs', message: `Leave out: ${species.join(', ')}.` }]
	);
}
