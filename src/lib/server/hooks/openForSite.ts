import { readEnvironment } from '#lib/server/env.ts';
import { openRuntime } from '#lib/server/runtime.ts';

/**
 * Opens the runtime unless the command that started this process has done so already, as `npm start` does. In
 * development nobody has, and what is opened stays open while the code is reloaded.
 */
export async function openForSite(): Promise<void> {
	await openRuntime({ ...readEnvironment(), command: 'npm run dev' });
}
