/**
 * `npm run bench:r`: the permutation test beside the Mantel test of R's vegan, where both are installed (Debian: r-base-core,
 * r-cran-vegan). Same matrices, same number of shuffles, in turns; prints the ratio of the medians per number of species.
 */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { median } from 'simple-statistics';
import { drawnOverlap, drawnTree, pairAgeMatrix } from '#lib/statistics/exampleTrees.ts';
import { preparePermutation } from '#lib/statistics/permutationDesign.ts';
import { randomStream } from '#lib/statistics/randomStream.ts';
import { runChunks } from '#lib/statistics/runChunks.ts';

const SHUFFLES = 1024;
const ROUNDS = 3;

/** Seconds of one call, matrices read beforehand; vegan counts one statistic. */
const SCRIPT = `
suppressPackageStartupMessages(library(vegan))
a <- commandArgs(TRUE)
x <- as.dist(as.matrix(read.csv(a[1], header = FALSE)))
y <- as.dist(as.matrix(read.csv(a[2], header = FALSE)))
cat(system.time(mantel(x, y, permutations = as.integer(a[3])))[["elapsed"]])
`;

function matrixText(values: Float64Array, n: number): string {
	return Array.from({ length: n }, (_, i) => [...values.subarray(i * n, (i + 1) * n)].join(',')).join('\n');
}

if (spawnSync('Rscript', ['-e', 'library(vegan)']).status !== 0) {
	process.stdout.write(
		'R with vegan is not installed here; nothing was measured. Debian: apt-get install r-base-core r-cran-vegan\n'
	);
	process.exit(0);
}
const folder = mkdtempSync(join(tmpdir(), 'kithline-bench-'));
try {
	writeFileSync(join(folder, 'mantel.R'), SCRIPT);
	for (const n of [50, 100, 200]) {
		const stream = randomStream(n, 0, 8);
		const tree = drawnTree(n, stream);
		const overlap = drawnOverlap(n, stream, 6);
		const design = preparePermutation({ tree, overlap });
		writeFileSync(join(folder, 'ages.csv'), matrixText(pairAgeMatrix(tree), n));
		writeFileSync(join(folder, 'overlap.csv'), matrixText(overlap, n));
		const ours: number[] = [];
		const theirs: number[] = [];
		for (let round = 0; round <= ROUNDS; round++) {
			const start = performance.now();
			runChunks(design, { seed: round, firstChunk: 0, chunkCount: SHUFFLES / 256, shuffles: SHUFFLES, within: false });
			const own = performance.now() - start;
			const asked = [join(folder, 'mantel.R'), join(folder, 'ages.csv'), join(folder, 'overlap.csv'), String(SHUFFLES)];
			const other = Number(spawnSync('Rscript', asked, { encoding: 'utf8' }).stdout) * 1000;
			if (round === 0) continue;
			ours.push(own);
			theirs.push(other);
		}
		const ratio = median(theirs) / median(ours);
		process.stdout.write(
			`${n} species, ${SHUFFLES} shuffles: five statistics here ${ratio.toFixed(1)} × as fast as one of vegan's mantel\n`
		);
	}
} finally {
	rmSync(folder, { recursive: true, force: true });
}
