import { EventEmitter } from 'node:events';
import { mkdirSync } from 'node:fs';
import { openDatabase } from './db/openDatabase.ts';
import type { Environment } from './env.ts';
import { heldRuntime, holdRuntime, type Runtime } from './heldRuntime.ts';
import type { AnalysisStore } from './jobs/analysisStore.ts';
import { openAnalysisWorker } from './jobs/analysisWorker.ts';
import { openPool } from './jobs/openPool.ts';
import { openQueue } from './jobs/queue.ts';
import { takeLock } from './lock.ts';
import { describeError, log } from './log.ts';
import { sweepTurns } from './rateLimit.ts';
import * as analyses from './repositories/analyses.ts';
import { keptSecret } from './secret.ts';

/** Named one by one, so that a reader and the check for unused code see who calls them. */
const STORE: AnalysisStore = {
	inputsOf: analyses.inputsOf,
	markWorking: analyses.markWorking,
	saveProgress: analyses.saveProgress,
	markFinished: analyses.markFinished,
	markStopped: analyses.markStopped,
	markFailed: analyses.markFailed
};

export type RuntimeOptions = Pick<Environment, 'dataFolder' | 'databaseUrl' | 'authSecret' | 'workers'> & {
	/** named to a second process that wants the same folder */
	readonly command: string;
	readonly isDemo?: boolean;
	/** takes analyses from the queue; a command of a moment does not */
	readonly works?: boolean;
	/** the code of the compute threads, for tests of the queue */
	readonly computeFile?: string;
	/** where the worker finds its inputs, for tests of the queue */
	readonly store?: AnalysisStore;
};

/**
 * Opens everything a process holds: the lock on the data folder, database, queue, compute threads, worker. Opened
 * once a process; a second call gets what is open.
 *
 * @throws {LockedError} when another process holds the data folder
 */
export async function openRuntime(options: RuntimeOptions): Promise<Runtime> {
	const open = heldRuntime();
	if (open !== undefined) return open;
	mkdirSync(options.dataFolder, { recursive: true, mode: 0o700 });
	const steps: Closing[] = [];
	try {
		const runtime = await openParts(options, steps);
		holdRuntime(runtime);
		// In the embedded database this process is the only one, so whatever stands as working was interrupted.
		if (options.works ?? true) await runtime.worker.recover({ all: runtime.database.kind === 'embedded' });
		return runtime;
	} catch (cause) {
		await closeAll(steps);
		throw cause;
	}
}

/** Ends everything in an orderly way: running analyses go back to the queue. */
export async function closeRuntime(): Promise<void> {
	await heldRuntime()?.close();
}

type Closing = () => unknown;

const SWEEP_EVERY_MS = 3_600_000;
const logSweep = (thrown: unknown) => log('warning', 'sweep', describeError(thrown));

async function openParts(options: RuntimeOptions, steps: Closing[]): Promise<Runtime> {
	if (options.databaseUrl === null) {
		const lock = takeLock(options.dataFolder, options.command);
		steps.unshift(lock.release);
	}
	const secret = keptSecret(options.dataFolder, options.authSecret);
	const database = await openDatabase(options);
	steps.unshift(() => holdRuntime(undefined), database.close);
	const queue = await openQueue(database.executeSql);
	steps.unshift(queue.close);
	const threads = options.workers;
	const pool = openPool({ threads, ...(options.computeFile === undefined ? {} : { file: options.computeFile }) });
	steps.unshift(pool.close);
	const progress = new EventEmitter().setMaxListeners(0);
	// One thread stays free for readings and previews that somebody waits for.
	const capacity = (options.works ?? true) ? Math.max(1, threads - 1) : 0;
	const worker = openAnalysisWorker({ queue, store: options.store ?? STORE, progress, capacity });
	steps.unshift(worker.close);
	const sweeping = setInterval(() => void sweepTurns().catch(logSweep), SWEEP_EVERY_MS).unref();
	steps.unshift(() => clearInterval(sweeping));
	const isDemo = options.isDemo ?? false;
	let closing: Promise<void> | null = null;
	const close = () => (closing ??= closeAll(steps));
	return { database, queue, pool, worker, progress, secret, dataFolder: options.dataFolder, isDemo, close };
}

/** Goes on after a step that fails: the database must be closed even when a thread will not end. */
async function closeAll(steps: readonly Closing[]): Promise<void> {
	for (const step of steps) {
		try {
			await step();
		} catch (thrown) {
			log('error', 'closing', describeError(thrown));
		}
	}
}
