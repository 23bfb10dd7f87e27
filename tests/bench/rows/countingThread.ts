/** Entry of a thread of `twoThreads`: counts the chunks it is sent and answers when it is done. */
import { parentPort } from 'node:worker_threads';
import { runChunks } from '#lib/statistics/runChunks.ts';
import type { ChunkShare } from '#lib/statistics/shuffleBatches.ts';
import { mantelCase } from './mantelCase.ts';
import { SPECIES } from './row.ts';

const { design } = mantelCase(SPECIES);

parentPort?.on('message', ({ share, shuffles }: { share: ChunkShare; shuffles: number }) => {
	const { counts } = runChunks(design, { ...share, seed: 1, shuffles, within: false, keep: [] });
	parentPort?.postMessage(counts.slope?.less);
});
