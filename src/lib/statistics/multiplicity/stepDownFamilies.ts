/** Hypotheses that share one null and one set of shuffles, judged together. */
export type Family = {
	/** p of each member, already adjusted for the number of members within the family */
	readonly p: readonly number[];
	/** the smallest p that the design lets any member reach, whatever the data */
	readonly smallestP: number;
};

export type AcrossFamilies = {
	/** families that the design lets reach the level; the others are not tested and cost nothing */
	readonly testable: readonly boolean[];
	/** adjusted p of each member, in the order given; null in a family that is not testable */
	readonly adjusted: readonly (readonly number[] | null)[];
};

/**
 * p-values adjusted across families whose shuffles are drawn apart. Two steps. First, families that cannot reach the
 * level are set aside: the largest set whose smallest p is within 1 - (1 - α)^(1/K), K being its own size. Sizes, number
 * of shuffles and level decide that, never the data. Then step-down by the Šidák bound, each family by its smallest p.
 *
 * @param families - p-values that behave as independent under their nulls (or any dependence at which Šidák's
 *   inequality holds)
 * @param alpha - level in (0, 1)
 * @see Tarone (1990), doi:10.2307/2531456, for setting aside; Holm (1979), Scand. J. Statist. 6:65, for the steps
 */
export function stepDownFamilies(families: readonly Family[], alpha: number): AcrossFamilies {
	const reach = testableLevel(families, alpha);
	const testable = families.map(({ smallestP }) => smallestP <= reach);
	const best = (index: number) => Math.min(...(families[index]?.p ?? [1]));
	const order = [...families.keys()].filter((index) => testable[index]).sort((a, b) => best(a) - best(b));
	const adjusted = families.map((): readonly number[] | null => null);
	let floor = 0;
	for (const [step, index] of order.entries()) {
		const left = order.length - step;
		adjusted[index] = (families[index]?.p ?? []).map((p) => Math.max(floor, sidakP(p, left)));
		floor = Math.max(floor, sidakP(best(index), left));
	}
	return { testable, adjusted };
}

/** The level for K families, K the smallest number that no more than K families can be tested at; 0 when none can. */
function testableLevel(families: readonly Family[], alpha: number): number {
	for (let count = 1; count <= families.length; count++) {
		const level = sidakLevel(alpha, count);
		if (families.filter(({ smallestP }) => smallestP <= level).length <= count) return level;
	}
	return 0;
}

/** 1 - (1 - α)^(1/K), by way of logarithms so that it keeps its digits for small α. */
function sidakLevel(alpha: number, count: number): number {
	return -Math.expm1(Math.log1p(-alpha) / count);
}

function sidakP(p: number, count: number): number {
	return p >= 1 ? 1 : -Math.expm1(count * Math.log1p(-p));
}
