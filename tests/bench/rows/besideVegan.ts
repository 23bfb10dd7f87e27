import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { countSlope, mantelCase } from './mantelCase.ts';
import { cpuTime, pairedRatio, type Row, SHUFFLES, SPECIES } from './row.ts';

/** CPU seconds of one call of vegan's Mantel test, matrices read beforehand. */
const SCRIPT = `
suppressPackageStartupMessages(library(vegan))
a <- commandArgs(TRUE)
x <- as.dist(as.matrix(read.csv(a[1], header = FALSE)))
y <- as.dist(as.matrix(read.csv(a[2], header = FALSE)))
time <- system.time(mantel(x, y, permutations = as.integer(a[3])))
cat(time[["user.self"]] + time[["sys.self"]])
`;
/** The whole number once takes vegan about half a minute. */
const ROUNDS = 3;

export async function besideVegan(): Promise<Row | null> {
	if (spawnSync('Rscript', ['-e', 'library(vegan)']).status !== 0) return null;
	const folder = mkdtempSync(join(tmpdir(), 'kithline-bench-'));
	try {
		const { design, ages, overlap } = mantelCase(SPECIES);
		const files = ['ages.csv', 'overlap.csv', 'mantel.R'].map((name) => join(folder, name));
		const [agesFile = '', overlapFile = '', scriptFile = ''] = files;
		writeFileSync(agesFile, matrixText(ages, SPECIES));
		writeFileSync(overlapFile, matrixText(overlap, SPECIES));
		writeFileSync(scriptFile, SCRIPT);
		const kernel = () => cpuTime(() => countSlope({ design, shuffles: SHUFFLES, seed: 1 }));
		const inR = () => {
			const asked = [scriptFile, agesFile, overlapFile, String(SHUFFLES)];
			return 1000 * Number(spawnSync('Rscript', asked, { encoding: 'utf8' }).stdout);
		};
		return {
			work: `Mantel test, ${SPECIES} species, ${SHUFFLES} shuffles included, one thread`,
			against: "R, vegan's mantel",
			measured: `${(await pairedRatio(kernel, inR, ROUNDS)).toFixed(0)} × as fast`,
			wanted: '150 ×'
		};
	} finally {
		rmSync(folder, { recursive: true, force: true });
	}
}

export function matrixText(values: Float64Array, n: number): string {
	return Array.from({ length: n }, (_, i) => [...values.subarray(i * n, (i + 1) * n)].join(',')).join('\n');
}
