import type { DrawingTasks } from '#lib/contracts/threadTasks.ts';
import { rasterise } from './rasterise.ts';

type Handlers = {
	readonly [Task in keyof DrawingTasks]: (argument: DrawingTasks[Task]['argument']) => DrawingTasks[Task]['answer'];
};

/** What a compute thread can be asked to draw. */
export const drawingTasks: Handlers = { platePng: rasterise };
