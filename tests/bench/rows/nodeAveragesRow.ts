import { kernelRegions } from '#lib/statistics/kernelRegions.ts';
import { countNodes, countSlope, mantelCase } from './mantelCase.ts';
import { cpuTime, pairedRatio, type Row, SHUFFLES, SPECIES } from './row.ts';

const CHUNK = 256;

/** Node averages against the kernel that visits every pair once for z alone, and against the shorter way to z. */
export async function nodeAveragesRow(): Promise<Row> {
	const { design, ages, overlap } = mantelCase(SPECIES);
	const n = SPECIES;
	const regions = kernelRegions({
		overlap,
		ages,
		arrangements: 4 * CHUNK * n,
		groups: Int32Array.of(0, n),
		sums: 8 * CHUNK,
		offsets: 4 * n
	});
	const { address } = regions;
	const everyPair = () => {
		for (let chunk = 0; chunk < SHUFFLES / CHUNK; chunk++) {
			regions.run('shuffles', [address('arrangements'), CHUNK, n, address('groups'), 1, 0, 1, chunk]);
			const sides = [address('overlap'), address('ages'), address('arrangements')];
			regions.run('denseSums', [...sides, CHUNK, n, address('sums'), address('offsets')]);
		}
	};
	const nodes = () => cpuTime(() => countNodes({ design, shuffles: SHUFFLES, seed: 1 }));
	const plain = await pairedRatio(() => cpuTime(everyPair), nodes, 9);
	const short = await pairedRatio(() => cpuTime(() => countSlope({ design, shuffles: SHUFFLES, seed: 1 })), nodes, 9);
	return {
		work: 'slope, and slope and intercept of plain and nested node averages',
		against: "the kernel for z alone that visits every pair; the shorter way to z round the tree's centre",
		measured: `${plain.toFixed(2)} × its time; ${short.toFixed(2)} × its time`,
		wanted: 'at most 2 ×'
	};
}
