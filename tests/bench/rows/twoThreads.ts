import { build } from 'esbuild';
import { once } from 'node:events';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Worker } from 'node:worker_threads';
import { chunksOf } from '#lib/statistics/runChunks.ts';
import type { ChunkShare } from '#lib/statistics/shuffleBatches.ts';
import { pairedRatio, type Row, SPECIES } from './row.ts';

const MANY_SHUFFLES = 99_999;
const ROUNDS = 5;

/** All statistics that every test counts, by the clock on the wall: what two threads are for. */
export async function twoThreads(): Promise<Row> {
	const folder = mkdtempSync(join(tmpdir(), 'kithline-bench-'));
	const file = join(folder, 'countingThread.mjs');
	const entry = join(import.meta.dirname, 'countingThread.ts');
	await build({ entryPoints: [entry], outfile: file, bundle: true, platform: 'node', format: 'esm', logLevel: 'error' });
	const threads = [new Worker(file), new Worker(file)];
	try {
		const half = Math.floor(chunksOf(MANY_SHUFFLES) / 2);
		const rest = { firstChunk: half, chunkCount: chunksOf(MANY_SHUFFLES) - half };
		const whole = [{ firstChunk: 0, chunkCount: chunksOf(MANY_SHUFFLES) }];
		const halves = [{ firstChunk: 0, chunkCount: half }, rest];
		const ratio = await pairedRatio(
			() => wallTime(threads, halves),
			() => wallTime(threads, whole),
			ROUNDS
		);
		return {
			work: `${MANY_SHUFFLES} shuffles of ${SPECIES} species, slope and node averages, two threads`,
			against: 'one thread, by the clock',
			measured: `${ratio.toFixed(2)} × as fast`,
			wanted: '1.7 ×'
		};
	} finally {
		await Promise.all(threads.map((thread) => thread.terminate()));
		rmSync(folder, { recursive: true, force: true });
	}
}

async function wallTime(threads: readonly Worker[], shares: readonly ChunkShare[]): Promise<number> {
	const start = performance.now();
	await Promise.all(
		shares.map(async (share, k) => {
			const thread = threads[k];
			if (thread === undefined) throw new Error('A share for every thread.');
			thread.postMessage({ share, shuffles: MANY_SHUFFLES });
			await once(thread, 'message');
		})
	);
	return performance.now() - start;
}
