import { expect, it } from 'vitest';
import { drawnOverlap } from './exampleTrees.ts';
import { randomStream } from './randomStream.ts';
import { type Run, runSums } from './runSums.ts';
import { shuffleBatches } from './shuffleBatches.ts';

function pairsInside(matrix: Float64Array, arrangement: Int32Array, { from, to }: Run): number {
	let sum = 0;
	for (let i = from; i < to; i++) {
		const row = (arrangement[i] ?? 0) * arrangement.length;
		for (let j = from; j < i; j++) sum += matrix[row + (arrangement[j] ?? 0)] ?? 0;
	}
	return sum;
}

// By the double loop over each run, on overlaps of two decimals; sums of few terms differ by rounding alone.
it('sums the pairs inside every run of every arrangement', () => {
	const tipCount = 23;
	const matrix = drawnOverlap(tipCount, randomStream(5, 0, 8));
	const runs = [
		{ from: 0, to: 23 },
		{ from: 3, to: 4 },
		{ from: 7, to: 20 },
		{ from: 21, to: 23 }
	];
	const sums = runSums({ matrix, tipCount, runs });
	const question = { tipCount, groups: [{ from: 0, to: tipCount }], domain: 0, seed: 2, permutations: 300 };
	for (const batch of shuffleBatches(question)) {
		const arrangements = batch.arrangements.slice();
		const found = sums({ ...batch, arrangements });
		for (let drawn = 0; drawn < batch.count; drawn++) {
			const arrangement = arrangements.subarray(drawn * tipCount, (drawn + 1) * tipCount);
			const expected = runs.map((run): unknown => expect.closeTo(pairsInside(matrix, arrangement, run), 11));
			expect([...found.subarray(drawn * runs.length, (drawn + 1) * runs.length)]).toEqual(expected);
		}
	}
});
