/**
 * Entry of a compute thread: a message in, one call of analysis or of a drawing, a message out. A refusal of the data
 * crosses the thread boundary as plain data, because an error class would not survive it.
 */
import type { MessagePort } from 'node:worker_threads';
import { computeTasks } from '#lib/analysis/computeTasks.ts';
import type { ComputeProgress } from '#lib/contracts/compute.ts';
import type { ThreadOutcome, ThreadTask, ThreadTasks } from '#lib/contracts/threadTasks.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import { drawingTasks } from '#lib/server/exports/drawingTasks.ts';

type Handlers = {
	readonly [Task in ThreadTask]: (
		argument: ThreadTasks[Task]['argument'],
		report: (progress: ComputeProgress) => void
	) => ThreadTasks[Task]['answer'];
};
/** A chunk of shuffles may take less than a tenth of a millisecond; each message costs the listening thread as much. */
const MESSAGE_EVERY_MS = 20;

const tasks: Handlers = { ...computeTasks, ...drawingTasks };

type Message<Task extends ThreadTask> = {
	readonly task: Task;
	readonly argument: ThreadTasks[Task]['argument'];
	readonly port: MessagePort | null;
};

export default async function answer<Task extends ThreadTask>({
	task,
	argument,
	port
}: Message<Task>): Promise<ThreadOutcome<Task>> {
	const report = atIntervals((progress) => port?.postMessage(progress));
	try {
		return { ok: true, value: await tasks[task](argument, report) };
	} catch (thrown) {
		if (!(thrown instanceof InputError)) throw thrown;
		const where = thrown.where === undefined ? {} : { where: thrown.where };
		return { ok: false, refusal: { code: thrown.code, message: thrown.message, ...where, remarks: remarksOf(thrown) } };
	} finally {
		port?.close();
	}
}

/** The first message at once, then one in so many milliseconds; between them nobody could see a difference. */
function atIntervals(post: (progress: ComputeProgress) => void): (progress: ComputeProgress) => void {
	let next = 0;
	return (progress) => {
		const now = performance.now();
		if (now < next) return;
		next = now + MESSAGE_EVERY_MS;
		post(progress);
	};
}

/** Some refusals carry what was noticed on the way; the sciences may add `remarks` to the error. */
function remarksOf(refusal: InputError): readonly Remark[] {
	return 'remarks' in refusal && Array.isArray(refusal.remarks) ? refusal.remarks : [];
}
