import { statSync } from 'node:fs';
import { Piscina } from 'piscina';
import type { ComputePool } from '#lib/server/heldRuntime.ts';
import { describeError, log } from '#lib/server/log.ts';
import { computeFile } from './computeFile.ts';

/** A thread takes 85 to 280 ms to start, so this many stay alive. */
const WARM_THREADS = 2;

export type PoolOptions = {
	readonly threads: number;
	/** the code of a thread; the compute bundle unless a test gives its own */
	readonly file?: string;
};

/**
 * Opens the pool of compute threads. They are first started when work arrives. In development the code changes under
 * a running pool, which would go on with the old: so a changed file brings a new pool, and the old one ends when idle.
 */
export function openPool({ threads, file }: PoolOptions): ComputePool {
	let path: string | null = file ?? null;
	let pool: Piscina | null = null;
	let codeTime = 0;

	const current = () => {
		path ??= computeFile();
		const time = statSync(path).mtimeMs;
		if (pool !== null && time === codeTime) return pool;
		if (pool !== null) retire(pool);
		codeTime = time;
		pool = new Piscina({ filename: path, minThreads: Math.min(WARM_THREADS, threads), maxThreads: threads, idleTimeout: 60_000 });
		return pool;
	};
	return { current, threads, close: async () => pool?.destroy() };
}

function retire(pool: Piscina): void {
	pool.close().catch((cause: unknown) => log('warning', 'compute-pool-retired', describeError(cause)));
}
