import { MessageChannel, receiveMessageOnPort } from 'node:worker_threads';
import type { ComputeProgress } from '#lib/contracts/compute.ts';
import type { ThreadOutcome, ThreadTask, ThreadTasks } from '#lib/contracts/threadTasks.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import { runtime } from '#lib/server/heldRuntime.ts';

export type ComputeOptions = {
	readonly onProgress?: (progress: ComputeProgress) => void;
	/** ends the thread that works on the task */
	readonly signal?: AbortSignal;
};

/** A refusal of the data with everything that was noticed on the way to it. */
export class ComputeRefusedError extends InputError {
	readonly remarks: readonly Remark[];

	constructor(refusal: { code: string; message: string; where?: Remark['where']; remarks?: readonly Remark[] }) {
		super(refusal.code, refusal.message, refusal.where);
		this.remarks = refusal.remarks ?? [];
	}
}

/**
 * Runs one task on a compute thread, so that the process goes on answering pages.
 *
 * @throws {InputError} when the data do not allow it, with `remarks` where there are any
 * @throws {Error} named AbortError after `signal`; any other error is a defect of ours
 */
export async function compute<Task extends ThreadTask>(
	task: Task,
	argument: ThreadTasks[Task]['argument'],
	{ onProgress, signal }: ComputeOptions = {}
): Promise<ThreadTasks[Task]['answer']> {
	const pool = runtime().pool.current();
	const channel = onProgress === undefined ? null : new MessageChannel();
	channel?.port2.on('message', (progress: ComputeProgress) => onProgress?.(progress));
	try {
		const outcome: ThreadOutcome<Task> = await pool.run(
			{ task, argument, port: channel?.port1 ?? null },
			{ transferList: channel === null ? [] : [channel.port1], signal: signal ?? null }
		);
		// What the thread said last may still be on its way when its answer is here.
		for (let late = next(channel); late !== null; late = next(channel)) onProgress?.(late);
		if (!outcome.ok) throw new ComputeRefusedError(outcome.refusal);
		return outcome.value;
	} finally {
		channel?.port2.close();
	}
}

function next(channel: MessageChannel | null): ComputeProgress | null {
	const received: { message: ComputeProgress } | undefined = channel === null ? undefined : receiveMessageOnPort(channel.port2);
	return received?.message ?? null;
}
