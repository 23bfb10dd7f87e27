/**
 * Entry of a compute thread: a message in, one call of analysis, a message out. A refusal of the data crosses the
 * thread boundary as plain data, because an error class would not survive it.
 */
import type { MessagePort } from 'node:worker_threads';
import { computeTasks } from '#lib/analysis/computeTasks.ts';
import type { ComputeOutcome, ComputeProgress, ComputeTask, ComputeTasks } from '#lib/contracts/compute.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import type { Remark } from '#lib/remarks/remark.ts';

type Message<Task extends ComputeTask> = {
	readonly task: Task;
	readonly argument: ComputeTasks[Task]['argument'];
	readonly port: MessagePort | null;
};

export default async function answer<Task extends ComputeTask>({
	task,
	argument,
	port
}: Message<Task>): Promise<ComputeOutcome<Task>> {
	const report = (progress: ComputeProgress) => port?.postMessage(progress);
	try {
		return { ok: true, value: await computeTasks[task](argument, report) };
	} catch (thrown) {
		if (!(thrown instanceof InputError)) throw thrown;
		const where = thrown.where === undefined ? {} : { where: thrown.where };
		return { ok: false, refusal: { code: thrown.code, message: thrown.message, ...where, remarks: remarksOf(thrown) } };
	} finally {
		port?.close();
	}
}

/** Some refusals carry what was noticed on the way; the sciences may add `remarks` to the error. */
function remarksOf(refusal: InputError): readonly Remark[] {
	return 'remarks' in refusal && Array.isArray(refusal.remarks) ? refusal.remarks : [];
}
