import { ladderised, split, tip, tipNames, withNames, type Clade } from './clade.ts';
import { shuffled, type RandomNumbers } from './randomNumbers.ts';

export type TreePlan = {
	readonly names: readonly string[];
	readonly rootAgeMa: number;
	readonly speciationPerMyr: number;
	readonly extinctionPerMyr: number;
	/** fewest and most species on the smaller side of the root */
	readonly smallerSide: readonly [number, number];
};

/** A lineage while the simulation runs: it lives on, has split, or died out. */
type Lineage = { fate: 'alive' | 'extinct' | 'split'; splitAtMyr: number; daughters: Lineage[] };

const MOST_TRIES = 200_000; // about one try in 60 gives the right number of species
const AGE_DECIMALS = 6; // ages are rounded here, so that the tree in memory is the tree in the file

/**
 * A birth–death tree grown forward from the root split to the present; tries with another number of living species, or with
 * a root split of another shape, are thrown away. Only living species are kept. Names are dealt to the tips at random.
 */
export function simulateTree(plan: TreePlan, random: RandomNumbers): Clade {
	for (let attempt = 0; attempt < MOST_TRIES; attempt++) {
		const grown = growOnce(plan, random);
		if (grown !== undefined && hasRootSplit(grown, plan)) return withNames(ladderised(grown), shuffled(plan.names, random));
	}
	throw new Error(`No tree of ${plan.names.length} species in ${MOST_TRIES} tries.`);
}

function growOnce(plan: TreePlan, random: RandomNumbers): Clade | undefined {
	const sides = [newLineage(), newLineage()];
	let alive = [...sides];
	let time = 0;
	const total = plan.speciationPerMyr + plan.extinctionPerMyr;
	for (;;) {
		time += random.exponential() / (total * alive.length);
		if (time >= plan.rootAgeMa) break;
		const [chosen] = alive.splice(random.index(alive.length), 1);
		if (chosen === undefined) return undefined;
		alive = [...alive, ...happen(chosen, time, random.uniform() * total < plan.speciationPerMyr)];
		if (alive.length === 0) return undefined;
	}
	if (alive.length !== plan.names.length) return undefined;
	return survivors({ fate: 'split', splitAtMyr: 0, daughters: sides }, plan.rootAgeMa);
}

function newLineage(): Lineage {
	return { fate: 'alive', splitAtMyr: 0, daughters: [] };
}

function happen(lineage: Lineage, time: number, splits: boolean): Lineage[] {
	lineage.fate = splits ? 'split' : 'extinct';
	lineage.splitAtMyr = time;
	lineage.daughters = splits ? [newLineage(), newLineage()] : [];
	return lineage.daughters;
}

/** The tree of the living: a split with one surviving side is no node of it. */
function survivors(lineage: Lineage, presentMyr: number): Clade | undefined {
	if (lineage.fate === 'extinct') return undefined;
	if (lineage.fate === 'alive') return tip('');
	const kept = lineage.daughters.map((daughter) => survivors(daughter, presentMyr)).filter((part) => part !== undefined);
	if (kept.length < 2) return kept[0];
	return split(Number((presentMyr - lineage.splitAtMyr).toFixed(AGE_DECIMALS)), kept);
}

function hasRootSplit(clade: Clade, plan: TreePlan): boolean {
	if (clade.ageMa !== plan.rootAgeMa) return false; // one of the two first lineages died out
	const smaller = Math.min(...clade.daughters.map((side) => tipNames(side).length));
	return smaller >= plan.smallerSide[0] && smaller <= plan.smallerSide[1];
}
