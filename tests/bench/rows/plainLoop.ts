import { identityArrangement, shuffleInPlace } from '#lib/statistics/arrangements.ts';
import { randomStream } from '#lib/statistics/randomStream.ts';
import { countSlope, mantelCase } from './mantelCase.ts';
import { cpuTime, pairedRatio, type Row, SHUFFLES, SPECIES } from './row.ts';

const PLAIN_SHUFFLES = 1_000;

/** The double loop that anybody would write first, on typed arrays, with the same shuffles. */
function plainMantel(ages: Float64Array, overlap: Float64Array, shuffles: number): number {
	const n = Math.round(Math.sqrt(ages.length));
	const z = (arrangement: Int32Array) => {
		let sum = 0;
		for (let i = 1; i < n; i++) {
			const row = (arrangement[i] ?? 0) * n;
			for (let j = 0; j < i; j++) sum += (ages[i * n + j] ?? 0) * (overlap[row + (arrangement[j] ?? 0)] ?? 0);
		}
		return sum;
	};
	const arrangement = identityArrangement(n);
	const observed = z(arrangement);
	const stream = randomStream(1, 0, 8);
	let less = 0;
	for (let drawn = 0; drawn < shuffles; drawn++) {
		shuffleInPlace(arrangement, stream, { from: 0, to: n });
		if (z(arrangement) <= observed) less++;
	}
	return less;
}

export async function plainLoop(): Promise<Row> {
	const { design, ages, overlap } = mantelCase(SPECIES);
	const kernel = () => cpuTime(() => countSlope({ design, shuffles: SHUFFLES, seed: 1 })) / SHUFFLES;
	const plain = () => cpuTime(() => plainMantel(ages, overlap, PLAIN_SHUFFLES)) / PLAIN_SHUFFLES;
	const ratio = await pairedRatio(kernel, plain, 9);
	return {
		work: `Mantel test, ${SPECIES} species, ${SHUFFLES} shuffles included, one thread`,
		against: 'plain TypeScript double loop with its shuffles',
		measured: `${ratio.toFixed(1)} × as fast`,
		wanted: '12 ×'
	};
}
