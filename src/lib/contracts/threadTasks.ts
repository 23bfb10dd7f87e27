import type { ComputeRefusal, ComputeTasks } from './compute.ts';

/** Tasks of the compute threads that draw. They read fonts, so they are no part of the sciences. */
export type DrawingTasks = {
	platePng: { argument: { svg: string; widthPx: number; dpi: number }; answer: Uint8Array };
};

/** Everything a compute thread can be asked. */
export type ThreadTasks = ComputeTasks & DrawingTasks;
export type ThreadTask = keyof ThreadTasks;
export type ThreadOutcome<Task extends ThreadTask> =
	{ readonly ok: true; readonly value: ThreadTasks[Task]['answer'] } | { readonly ok: false; readonly refusal: ComputeRefusal };
