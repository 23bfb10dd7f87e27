import { describe, expect, it } from 'vitest';
import type { ComputeProgress } from '#lib/contracts/compute.ts';
import { analyse } from './analyse.ts';
import { analyseShare } from './analyseShare.ts';
import { drawnInputs } from './drawnInputs.fixture.ts';
import { MICRO_INPUTS, microPlan } from './microResult.fixture.ts';
import { joinShares, shareOut } from './shareOut.ts';

const inputs = drawnInputs(14);

describe('shareOut', () => {
	it('deals every chunk once, in runs that differ by one at most', () => {
		const plan = microPlan({ permutations: 999_999 });
		for (const threads of [2, 3, 8]) {
			const shares = shareOut(plan, 200, threads);
			expect(shares).toHaveLength(threads);
			let next = 0;
			for (const { firstChunk, chunkCount } of shares) {
				expect(firstChunk).toBe(next);
				next += chunkCount;
			}
			expect(next).toBe(3907); // 999,999 in chunks of 256
			const counts = shares.map(({ chunkCount }) => chunkCount);
			expect(Math.max(...counts) - Math.min(...counts)).toBeLessThanOrEqual(1);
		}
	});

	// By hand: 19,900 pairs, 9,999 shuffles and 1.5 ns are 0.3 s; 99,999 are 3 s.
	it('shares nothing that one thread does within half a second, and nothing with one thread', () => {
		expect(shareOut(microPlan({ permutations: 9_999 }), 200, 2)).toEqual([]);
		expect(shareOut(microPlan({ permutations: 99_999 }), 200, 2)).toHaveLength(2);
		expect(shareOut(microPlan({ permutations: 99_999 }), 200, 1)).toEqual([]);
	});

	it('leaves a test over all trees to one thread, so that no p of a single tree is told on the way', () => {
		expect(shareOut(microPlan({ permutations: 99_999, tree: 'all' }), 200, 2)).toEqual([]);
	});
});

describe('analyseShare', () => {
	it.each([1, 2, 3, 8])('gives the result of one thread, to the last bit, by %i shares', (count) => {
		const plan = microPlan({ permutations: 2_999, seed: 7, alsoTest: ['spearman', 'nodes-nested'] });
		const alone = analyse(inputs, plan);
		const chunks = 12; // 2,999 in chunks of 256
		const start = (share: number) => Math.floor((share * chunks) / count);
		const shares = Array.from({ length: count }, (_, k) => {
			const share = { firstChunk: start(k), chunkCount: start(k + 1) - start(k) };
			return structuredClone(analyseShare({ inputs, plan, share }));
		});
		expect(analyse(inputs, plan, undefined, [...shares].reverse())).toEqual(alone);
	});

	it('leaves what is enumerated to the whole', () => {
		const plan = microPlan();
		const share = { firstChunk: 0, chunkCount: 40 };
		expect(analyseShare({ inputs: MICRO_INPUTS, plan, share })).toEqual({ free: null, within: null });
		expect(analyse(MICRO_INPUTS, plan, undefined, [{ free: null, within: null }])).toEqual(analyse(MICRO_INPUTS, plan));
	});
});

describe('joinShares', () => {
	it('ends at the p of the whole, from the counts of all shares', () => {
		const plan = microPlan({ permutations: 999, seed: 7, alternative: 'two-sided' });
		const last: ComputeProgress[] = [];
		for (const [k, share] of [
			{ firstChunk: 0, chunkCount: 1 },
			{ firstChunk: 1, chunkCount: 3 }
		].entries()) {
			analyseShare({ inputs, plan, share }, (progress) => (last[k] = progress));
		}
		const [one, other] = last;
		if (one === undefined || other === undefined) throw new Error('Each share tells its progress.');
		const { permutation } = analyse(inputs, plan);
		const joined = joinShares(plan, last, other);
		expect(joined).toMatchObject({ p: permutation.p, asExtreme: permutation.asExtreme, total: 2 * 999, done: 2 * 999 });
		expect(joined).not.toHaveProperty('share');
	});
});
