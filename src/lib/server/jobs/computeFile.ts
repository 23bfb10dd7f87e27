import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { runsFromBuild } from '#lib/server/db/template.ts';
import { projectRoot } from '#lib/server/folders.ts';

/**
 * Where the bundled code of the compute threads is: beside a production build, or where vite and vitest keep it fresh.
 *
 * @throws {Error} when it was not made yet
 */
export function computeFile(): string {
	const path = runsFromBuild()
		? join(projectRoot(), 'build', 'worker', 'compute.mjs')
		: join(projectRoot(), '.svelte-kit', 'kithline', 'compute.mjs');
	if (existsSync(path)) return path;
	throw new Error(`Expected the compute threads' code at ${path}; run "npm run build", or "npm run dev" for development.`);
}
