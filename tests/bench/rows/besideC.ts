import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { countSlope, mantelCase } from './mantelCase.ts';
import { cpuTime, pairedRatio, type Row, SHUFFLES, SPECIES } from './row.ts';

/** The same double loop in C with shuffles of its own; prints CPU seconds of so many shuffles. */
const SOURCE = `
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <time.h>
static uint64_t state = 88172645463325252ULL;
static uint32_t draw(void) { state ^= state << 13; state ^= state >> 7; state ^= state << 17; return (uint32_t)(state >> 32); }
static double z(const double *t, const double *o, const int *p, int n) {
	double sum = 0;
	for (int i = 1; i < n; i++)
		for (int j = 0; j < i; j++) sum += t[i * n + j] * o[p[i] * n + p[j]];
	return sum;
}
int main(int count, char **text) {
	int n = atoi(text[2]), m = atoi(text[3]), less = 0;
	double *t = malloc(sizeof(double) * n * n), *o = malloc(sizeof(double) * n * n);
	int *p = malloc(sizeof(int) * n);
	FILE *file = fopen(text[1], "rb");
	if (count < 4 || !file || fread(t, 8, n * n, file) + fread(o, 8, n * n, file) != (size_t)(2 * n * n)) return 1;
	for (int i = 0; i < n; i++) p[i] = i;
	double observed = z(t, o, p, n);
	clock_t start = clock();
	for (int k = 0; k < m; k++) {
		for (int i = n - 1; i > 0; i--) {
			int j = (int)(((uint64_t)draw() * (i + 1)) >> 32), moved = p[i];
			p[i] = p[j];
			p[j] = moved;
		}
		less += z(t, o, p, n) <= observed;
	}
	printf("%.6f %d", (double)(clock() - start) / CLOCKS_PER_SEC, less);
	return 0;
}
`;

export async function besideC(): Promise<Row | null> {
	if (spawnSync('gcc', ['--version']).status !== 0) return null;
	const folder = mkdtempSync(join(tmpdir(), 'kithline-bench-'));
	try {
		writeFileSync(join(folder, 'mantel.c'), SOURCE);
		const built = spawnSync('gcc', ['-O3', '-march=native', '-o', join(folder, 'mantel'), join(folder, 'mantel.c')]);
		if (built.status !== 0) throw new Error(String(built.stderr));
		const { design, ages, overlap } = mantelCase(SPECIES);
		writeFileSync(join(folder, 'matrices'), Buffer.concat([Buffer.from(ages.buffer), Buffer.from(overlap.buffer)]));
		const kernel = () => cpuTime(() => countSlope({ design, shuffles: SHUFFLES, seed: 1 }));
		const inC = () => {
			const asked = [join(folder, 'matrices'), String(SPECIES), String(SHUFFLES)];
			return 1000 * Number(spawnSync(join(folder, 'mantel'), asked, { encoding: 'utf8' }).stdout.split(' ')[0]);
		};
		return {
			work: 'the same',
			against: 'plain C double loop, gcc -O3 -march=native, with shuffles of its own',
			measured: `${(await pairedRatio(kernel, inC, 9)).toFixed(1)} × as fast`,
			wanted: '2.5 ×'
		};
	} finally {
		rmSync(folder, { recursive: true, force: true });
	}
}
