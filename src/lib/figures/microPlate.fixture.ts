import type { PlateInput } from './plateModel.ts';

/**
 * (((A:1,B:1):1,C:2):2,D:4) with Schoener's D of the worked micro-example (methods, section B). Preorder: root 0, ABC 1,
 * AB 2, A 3, B 4, C 5, D 6. Slope −31/265, intercept 238/265; node averages, nested: 4/5, 13/20, 9/20, slope −4/35, intercept 9/10.
 * The 12 distinct relabellings and their slopes are those of its table, each counted twice among 24.
 */
export const MICRO_SLOPES = [-31, -28, -25, -1, 2, 8, 11, 11, 11, 11, 14, 17].map((numerator) => numerator / 265);

export function microPlate(names: readonly string[] = ['A', 'B', 'C', 'D']): PlateInput {
	const nodes = [
		{ node: 0, nested: 9 / 20, plain: 13 / 30 },
		{ node: 1, nested: 13 / 20, plain: 13 / 20 },
		{ node: 2, nested: 4 / 5, plain: 4 / 5 }
	];
	return {
		plate: {
			tree: { parent: [-1, 0, 1, 2, 2, 1, 0], age: [4, 2, 1, 0, 0, 0, 0], label: ['', '', '', ...names] },
			species: [...names],
			overlapLower: [0.8, 0.7, 0.6, 0.4, 0.4, 0.5],
			meanAge: 17 / 6,
			meanOverlap: 17 / 30,
			fanSlopes: [...MICRO_SLOPES],
			slopeHistogram: { edges: [-0.12, -0.06, 0, 0.06, 0.12], counts: [6, 2, 14, 2] },
			nodeSlopeHistogram: null
		},
		regression: { slope: -31 / 265, intercept: 238 / 265 },
		nodeAverages: { nodes, nested: { slope: -4 / 35, intercept: 9 / 10 }, plain: { slope: -101 / 840, intercept: 109 / 120 } },
		permutation: { count: 24, exact: true }
	};
}

/** A ladder of `count` species, ages 1 to count − 1 from the tips up: the deepest shape a tree can have. */
export function ladderPlate(count: number): PlateInput {
	const parent = [-1];
	const age = [count - 1];
	for (let step = count - 2; step >= 1; step--) {
		parent.push(parent.length - 1);
		age.push(step);
	}
	const last = parent.length - 1;
	parent.push(last);
	age.push(0);
	for (let node = last; node >= 0; node--) {
		parent.push(node);
		age.push(0);
	}
	const species = Array.from({ length: count }, (_, row) => `Genus s${row}`);
	const base = microPlate();
	const overlapLower = Array.from({ length: (count * (count - 1)) / 2 }, () => 0.5);
	return {
		...base,
		plate: { ...base.plate, tree: { parent, age, label: parent.map(() => '') }, species, overlapLower },
		nodeAverages: { ...base.nodeAverages, nodes: [] }
	};
}
