import { describe, expect, it } from 'vitest';
import { type AnalysisProgress, analysisResultSchema } from '#lib/contracts/analysisResult.ts';
import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import { drawnTree } from '#lib/statistics/exampleTrees.ts';
import { nextBelow, randomStream, type RandomStream } from '#lib/statistics/randomStream.ts';
import { analyse } from '../analyse.ts';
import { MICRO_INPUTS, microPlan } from '../microResult.fixture.ts';
import { previewAnalysis } from '../previewAnalysis.ts';

const MICRO_TREE = '(((A:1,B:1):1,C:2):2,D:4);';
const ALL = { tree: 'all' } as const;

const micro = (...trees: string[]): AnalysisInputs => ({ ...MICRO_INPUTS, treeText: trees.join('\n') });

/** A drawn tree of the species, written down with its tips in an order of their own. */
function written(species: readonly string[], stream: RandomStream): string {
	const { parent, ages } = drawnTree(species.length, stream);
	const left = [...species];
	const inner = new Set(parent);
	const visit = (node: number): string => {
		const below = [...parent.keys()].filter((child) => parent[child] === node).map(visit);
		const label = inner.has(node) ? `(${below.join(',')})` : left.splice(nextBelow(stream, left.length), 1)[0];
		const above = parent[node] ?? -1;
		return `${label}${above < 0 ? ';' : `:${(ages[above] ?? 0) - (ages[node] ?? 0)}`}`;
	};
	return visit(0);
}

const TEN = [...'abcdefghij'];
const stream = randomStream(4, 4, 8);
const SET: AnalysisInputs = {
	...MICRO_INPUTS,
	treeText: Array.from({ length: 12 }, () => written(TEN, stream)).join('\n'),
	overlap: { species: TEN, lower: Float64Array.from({ length: 45 }, (_, i) => ((i * 37 + 11) % 89) / 100), remarks: [] }
};
const PLAN = microPlan({ ...ALL, permutations: 499, seed: 3 });

function refusal(inputs: AnalysisInputs, plan = microPlan(ALL)): string {
	try {
		analyse(inputs, plan);
	} catch (thrown) {
		if (thrown instanceof InputError) return `${thrown.code}: ${thrown.message}`;
		throw thrown;
	}
	return 'not refused';
}

describe('analyse, over all trees of a set', () => {
	// By property: the mean over equal trees is the value of one. Worked example: 2 of 24, slope -31/265.
	it('says of equal trees what it says of one', () => {
		const one = analyse(micro(MICRO_TREE), microPlan());
		const all = analyse(micro(MICRO_TREE, '(D:4,(C:2,(A:1,B:1):1):2);', MICRO_TREE), microPlan(ALL));
		expect(all.permutation).toMatchObject({ asExtreme: 2, p: 2 / 24, smallestP: one.permutation.smallestP });
		expect(all.permutation.observed).toBeCloseTo(-31 / 265, 13);
		expect(all.permutation.withinDeepestSplit).toEqual(one.permutation.withinDeepestSplit);
		expect(all.regression).toEqual(one.regression);
		expect(all.trees).toMatchObject({ count: 3, inText: 3, burnIn: 0, thin: 1, p: 2 / 24, shareBelow: 1 });
		expect(all.trees?.slopes.mean).toBeCloseTo(-31 / 265, 13);
		expect(all.trees?.deepestSplit).toEqual({ sides: [3, 1], share: 1 });
		expect(all.trees?.nodes).toEqual(
			[0, 1, 2].map((node, place) => ({
				node,
				share: 1,
				age: [
					[4, 4],
					[2, 2],
					[1, 1]
				][place]
			}))
		);
		expect(all.trees?.lines).toHaveLength(3);
	});

	it('does not heed the scale of single trees, but shows it in the slopes', () => {
		const all = analyse(micro(MICRO_TREE, '(((A:2,B:2):2,C:4):4,D:8);'), microPlan(ALL));
		expect(all.permutation.p).toBe(2 / 24);
		// By hand: slopes -31/265 and half of it.
		expect(all.trees?.slopes.mean).toBeCloseTo((-31 / 265) * 0.75, 13);
		expect(all.trees?.r.highestDensity[0]).toBeCloseTo(all.regression.r, 12);
	});

	it('keeps to its contract, and gives equal bits whatever is told on the way', () => {
		const result = analyse(SET, PLAN);
		expect(analysisResultSchema.parse(result)).toEqual(result);
		expect(analyse(SET, PLAN, () => undefined)).toEqual(result);
	});

	it('draws the tree that the text marks, else the first', () => {
		const nexus = (mark: string) =>
			`#NEXUS\nbegin trees;\ntree one = ${MICRO_TREE}\ntree ${mark}two = (((A:2,B:2):2,C:4):4,D:8);\nend;`;
		expect(analyse(micro(nexus('')), microPlan(ALL)).compared.tree).toEqual({ index: 0, name: 'one', treesInSet: 2 });
		const marked = analyse(micro(nexus('* ')), microPlan(ALL));
		expect(marked.compared.tree).toEqual({ index: 1, name: 'two', treesInSet: 2 });
		expect(marked.compared.rootAge).toBe(8);
		expect(marked.remarks.find(({ code }) => code === 'trees-averaged')?.message).toBe(
			'The test averages over 2 trees. The line, the node means and the figure are those of tree 2 (“two”).'
		);
	});

	// By hand: of five trees the first two are left out, then every second is kept: the third and the fifth.
	it('uses the trees that the set has chosen', () => {
		const ages = [1, 2, 3, 4, 5].map((age) => `(((A:${age},B:${age}):${age},C:${2 * age}):${2 * age},D:${4 * age});`);
		const result = analyse({ ...micro(...ages), chosen: { burnIn: 2, thin: 2 } }, microPlan(ALL));
		expect(result.trees).toMatchObject({ count: 2, inText: 5, burnIn: 2, thin: 2 });
		expect(result.compared).toMatchObject({ rootAge: 12, tree: { index: 2, treesInSet: 2 } });
		expect(result.remarks.map(({ message }) => message)).toContain(
			'The test averages over 2 trees of the 5 in the text (the first 2 left out, every 2nd kept). The line, the node means and the figure are those of tree 3.'
		);
	});

	it('is the test on one tree where one is left', () => {
		const result = analyse({ ...micro(MICRO_TREE, MICRO_TREE), chosen: { burnIn: 1, thin: 1 } }, microPlan(ALL));
		expect(result.trees).toBeUndefined();
		expect(result.permutation.p).toBe(2 / 24);
	});

	it('adjusts what is tested beside the plan over all trees too', () => {
		const { permutation } = analyse(
			SET,
			microPlan({ ...ALL, permutations: 499, seed: 3, alsoTest: ['nodes-plain', 'spearman'] })
		);
		const alone = analyse(SET, microPlan({ ...ALL, permutations: 499, seed: 3, statistic: 'spearman' })).permutation;
		expect(permutation.also?.[1]).toMatchObject({ statistic: 'spearman', p: alone.p, observed: alone.observed });
		expect(permutation.pAdjusted).toBeGreaterThanOrEqual(permutation.p);
	});

	it('agrees with its preview', () => {
		const [preview, result] = [previewAnalysis(SET, PLAN), analyse(SET, PLAN)];
		expect(preview.trees).toEqual({ count: 12, splitShare: result.trees?.deepestSplit.share });
		expect(preview.sides).toEqual(result.permutation.withinDeepestSplit?.sides);
		expect(preview.smallestP).toBe(result.permutation.smallestP);
		expect(preview.rootPairShare).toBeCloseTo(result.permutation.withinDeepestSplit?.rootPairShare ?? NaN, 14);
	});

	it('counts the shuffles of both parts in its progress, and ends with the p of all trees', () => {
		const told: AnalysisProgress[] = [];
		const result = analyse(SET, PLAN, (progress) => told.push(progress));
		const last = told.at(-1);
		expect(last?.done).toBe(last?.total);
		expect(new Set(told.map(({ total }) => total)).size).toBe(1);
		expect(told.map(({ done }) => done)).toEqual(told.map(({ done }) => done).sort((a, b) => a - b));
		expect(last?.p).toBeCloseTo(result.permutation.p, 3);
	});
});

describe('analyse, over trees that do not allow it', () => {
	it('names the tree and the species where one is missing', () => {
		expect(refusal(micro(MICRO_TREE, MICRO_TREE, '((A:1,B:1):1,C:2);'))).toBe(
			'tips-differ: Expected every tree of the set to hold the species that are tested; tree 3 lacks “D”. ' +
				'Name the species of the plan without it, choose one tree, or bring trees of the same tips.'
		);
	});

	it('leaves out tips that only some trees hold, and says so', () => {
		const result = analyse(micro(MICRO_TREE, '(((A:1,B:1):1,(C:1,X:1):1):2,D:4);'), microPlan(ALL));
		expect(result.permutation.p).toBe(2 / 24);
		expect(result.remarks.find(({ code }) => code === 'extra-tips')?.message).toBe(
			'Some trees hold tips that tree 1 lacks; they are left out: X.'
		);
	});

	it('counts the trees in which something is open, and levels them once it is confirmed', () => {
		const uneven = micro(MICRO_TREE, '(((A:1,B:1):1,C:2):2,D:4.02);', '(((A:1,B:1):1,C:2.02):2,D:4);');
		expect(refusal(uneven)).toMatch(
			/^spread-needs-decision: In 2 of the 3 trees that are used, the first being tree 2: Root-to-tip/
		);
		expect(analyse({ ...uneven, spreadConfirmed: true }, microPlan(ALL)).trees?.rootAge.highestDensity[1]).toBeCloseTo(4.02, 12);
		expect(refusal({ ...uneven, chosen: { burnIn: 0, thin: 3 } })).toBe('not refused');
	});

	it('names the tree whose ages are all one', () => {
		expect(refusal(micro(MICRO_TREE, '(A:1,B:1,C:1,D:1);'))).toMatch(/^constant-ages: In tree 2: Expected ages that differ/);
	});

	it('names the tree in which a common ancestor has age 0, when its logarithm is asked for', () => {
		const zero = micro(MICRO_TREE, '(((A:0,B:0):2,C:2):2,D:4);');
		expect(refusal(zero, microPlan({ ...ALL, statistic: 'slope-log-age' }))).toMatch(
			/^age-zero: In tree 2: The slope on the logarithm/
		);
	});

	it('says that the burn-in leaves none', () => {
		expect(refusal({ ...micro(MICRO_TREE, MICRO_TREE), chosen: { burnIn: 2, thin: 1 } })).toBe(
			'burn-in-too-long: Expected the burn-in to leave at least one tree; the text holds 2 and 2 are left out. Give a smaller number.'
		);
	});
});
