import type { Plan } from '#lib/contracts/plan.ts';
import { treeShape } from '#lib/statistics/agedTree.ts';
import { cladesOf, groupOf, type SpeciesGroup } from '#lib/statistics/clades/cladeList.ts';
import type { PreparedAnalysis } from './prepareAnalysis.ts';
import { AnalysisRefusal } from './refusal.ts';

/** Names listed in a sentence before the rest is counted. */
const NAMED = 5;

/**
 * The groups of species that a plan asks about: all clades large enough, or those declared in their place. Empty when the
 * plan asks about none. A group that is no clade of this tree is allowed; one declared twice is tested once.
 *
 * @throws {AnalysisRefusal} `unknown-species`; `clade-size` for a group of fewer than 2 species or of all but one;
 *   `no-clades` when no clade is large enough
 */
export function cladeGroups(
	{ tree, ages, species }: Pick<PreparedAnalysis, 'tree' | 'ages' | 'species'>,
	plan: Plan
): SpeciesGroup[] {
	if (plan.clades === null) return [];
	const shape = treeShape({ parent: tree.parent, ages });
	const { minTips, declared } = plan.clades;
	if (declared !== undefined) {
		const groups = declared.map((names) => groupOf(shape, positionsOf(names, species)));
		for (const group of groups) refuseSize(group, species.length);
		return [...new Map(groups.map((group) => [group.members.join(), group])).values()];
	}
	const clades = cladesOf(shape, minTips);
	if (clades.length === 0) {
		throw new AnalysisRefusal(
			'no-clades',
			`No clade inside the tree of these ${species.length} species has ${minTips} species or more. Ask for smaller clades, or for none.`
		);
	}
	return clades;
}

function positionsOf(names: readonly string[], species: readonly string[]): number[] {
	const positions = new Map(species.map((name, position) => [name, position]));
	const unknown = names.filter((name) => !positions.has(name.trim()));
	if (unknown.length > 0) {
		const more = unknown.length > NAMED ? `, and ${unknown.length - NAMED} more` : '';
		throw new AnalysisRefusal(
			'unknown-species',
			`A declared clade names species that are not compared: ${unknown.slice(0, NAMED).join(', ')}${more}. Write the names as the tree does.`
		);
	}
	return names.map((name) => positions.get(name.trim()) ?? 0);
}

function refuseSize({ members }: SpeciesGroup, count: number): void {
	if (members.length >= 2 && members.length <= count - 2) return;
	throw new AnalysisRefusal(
		'clade-size',
		`A declared clade has 2 to ${count - 2} of the ${count} species compared; one has ${members.length}. Name others, or leave it out.`
	);
}
