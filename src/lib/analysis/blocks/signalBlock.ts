import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { SignalBlock } from '#lib/contracts/resultBlocks.ts';
import { treeShape } from '#lib/statistics/agedTree.ts';
import { testK } from '#lib/statistics/signal/blombergK.ts';
import { holm } from '#lib/statistics/signal/holm.ts';
import { pagelLambda } from '#lib/statistics/signal/pagelLambda.ts';
import { FEWEST_FOR_WEIGHTS, traitModels } from '#lib/statistics/signal/traitModels.ts';
import { nicheTraits, type NicheTrait } from '../nicheTraits.ts';
import type { BlockContext } from './blockContext.ts';

type Variable = SignalBlock['variables'][number];

/** Shuffles of K beyond this change no reading; each costs one pass along the tree for every variable. */
const MOST_SHUFFLES = 9999;
const WALKS = 1999;
/** Below this the choice of a model is mostly chance. Common practice. */
const FEWEST_FOR_MODELS = 20;

/** Signal in the niche positions that the plan names, and in what can make overlap fall by itself. */
export function signalBlock({ inputs, plan, prepared }: BlockContext): Pick<AnalysisResult, 'signal'> {
	const traits = nicheTraits(prepared, inputs, plan);
	if (plan.signal === null || inputs.niches === undefined) return {};
	const shuffles = { permutations: Math.min(plan.permutations, MOST_SHUFFLES), seed: plan.seed, walks: WALKS };
	const variables = traits.map((trait) => describe(trait, shuffles));
	return { signal: { table: inputs.niches.label, variables: adjusted(variables) } };
}

function describe(niche: NicheTrait, shuffles: { permutations: number; seed: number; walks: number }): Variable {
	const { name, role, tree, trait, leftOut } = niche;
	const { k, p, exact, count, pAboveRandomWalk } = testK(tree, trait.values, shuffles);
	const resolved = treeShape(tree).internal.length > 1;
	return {
		variable: name,
		role,
		species: trait.values.length,
		leftOut: [...leftOut],
		k: { value: k, p, exact, count, pAdjusted: p, pAboveRandomWalk },
		lambda: resolved ? lambdaOf(niche) : null,
		models: resolved ? traitModels(tree, trait) : [],
		measurementError: trait.standardErrors !== null,
		notes: notesOf(niche, resolved)
	};
}

function lambdaOf({ tree, trait }: NicheTrait): Variable['lambda'] {
	const { lambda, interval, pAgainst0, pAgainst1 } = pagelLambda(tree, trait);
	return { estimate: lambda, interval: [...interval], pAgainst0, pAgainst1 };
}

function notesOf({ trait, errorsIncomplete }: NicheTrait, resolved: boolean): string[] {
	const n = trait.values.length;
	const notes: string[] = [];
	if (!resolved) notes.push('These species part at one node: λ and the models cannot be told apart on such a star.');
	if (n < FEWEST_FOR_WEIGHTS) notes.push(`With ${n} species the models are listed without weights.`);
	else if (n < FEWEST_FOR_MODELS)
		notes.push(`With ${n} species the choice among models is mostly chance; ${FEWEST_FOR_MODELS} are usual.`);
	if (errorsIncomplete) notes.push('Standard errors are missing for some species, so none is used.');
	return notes;
}

/** Several positions are several chances: Holm over them. Breadth, records and range size are read as warnings, one by one. */
function adjusted(variables: readonly Variable[]): Variable[] {
	const positions = variables.filter(({ role }) => role === 'position');
	const values = holm(positions.map(({ k }) => k.p));
	return variables.map((variable) => {
		const index = positions.indexOf(variable);
		return index < 0 ? variable : { ...variable, k: { ...variable.k, pAdjusted: values[index] ?? variable.k.p } };
	});
}
