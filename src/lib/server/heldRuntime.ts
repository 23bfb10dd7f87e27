import type { EventEmitter } from 'node:events';
import type { Piscina } from 'piscina';
import type { AnalysisProgress } from '#lib/contracts/analysisResult.ts';
import type { Database } from './db/openDatabase.ts';
import type { AnalysisWorker } from './jobs/analysisWorker.ts';
import type { JobQueue } from './jobs/queue.ts';

/** What one process holds open. The command bundle and the site's bundle run in one process and must share it. */
export type Runtime = {
	readonly database: Database;
	readonly queue: JobQueue;
	readonly pool: ComputePool;
	readonly worker: AnalysisWorker;
	/** what running analyses say, for pages that watch them */
	readonly progress: EventEmitter;
	/** signs sessions */
	readonly secret: string;
	readonly dataFolder: string;
	readonly isDemo: boolean;
	readonly close: () => Promise<void>;
};

export type ComputePool = {
	/** the pool that serves now; a new one in development when the thread's code has changed */
	readonly current: () => Piscina;
	readonly threads: number;
	readonly close: () => Promise<void>;
};

/** an analysis that runs in this process */
export type RunningAnalysis = { readonly id: string; readonly stop: AbortController; latest: AnalysisProgress | null };

type Holder = { [slot: symbol]: Runtime | undefined };

/** `Symbol.for` is the same symbol in every copy of this module, so two bundles meet in the same slot. */
const SLOT = Symbol.for('kithline.runtime');
const holder = globalThis as Holder;

export function heldRuntime(): Runtime | undefined {
	return holder[SLOT];
}

/** @throws {Error} when nothing has opened the runtime yet: a defect of ours */
export function runtime(): Runtime {
	const held = holder[SLOT];
	if (held === undefined) throw new Error('Expected an open runtime; call openRuntime first.');
	return held;
}

export function holdRuntime(held: Runtime | undefined): void {
	holder[SLOT] = held;
}
