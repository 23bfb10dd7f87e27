/**
 * Bundles what the site's own build cannot: the compute thread and the command-line entries.
 * `vite.config.ts` uses `computeBundle()` so that development and tests run the same thread code;
 * `node esbuild.config.mjs build` writes everything a production folder needs into build/.
 */
import { context, build } from 'esbuild';
import { existsSync, readFileSync, readdirSync } from 'node:fs';
import { resolve } from 'node:path';

const root = import.meta.dirname;
const shared = {
	bundle: true,
	platform: 'node',
	format: 'esm',
	target: 'node20',
	// What production installs stays outside; the one development package the commands touch (the site's kit) comes along.
	external: Object.keys(JSON.parse(readFileSync(resolve(root, 'package.json'), 'utf8')).dependencies),
	// Some packages inside a bundle still call require().
	banner: {
		js: "import { createRequire as __createRequire } from 'node:module'; const require = __createRequire(import.meta.url);"
	},
	sourcemap: true,
	logLevel: 'warning'
};
const compute = resolve(root, 'src/worker/compute.ts');

/** Keeps .svelte-kit/kithline/compute.mjs fresh while vite or vitest runs. */
export function computeBundle() {
	return {
		name: 'kithline-compute-bundle',
		async buildStart() {
			if (!existsSync(compute)) return;
			const watched = await context({
				...shared,
				entryPoints: [compute],
				outfile: resolve(root, '.svelte-kit/kithline/compute.mjs')
			});
			await watched.rebuild();
			if (this.meta?.watchMode && process.env.NODE_ENV === 'development') await watched.watch();
			else await watched.dispose();
		}
	};
}

if (process.argv[2] === 'build') {
	const commands = resolve(root, 'src/commands');
	// The examples are written in development; a production folder only reads them.
	const entries = readdirSync(commands)
		.filter((name) => name.endsWith('.ts') && !name.endsWith('.test.ts') && name !== 'makeExamples.ts')
		.map((name) => resolve(commands, name));
	await build({ ...shared, entryPoints: [compute], outfile: resolve(root, 'build/worker/compute.mjs') });
	await build({ ...shared, entryPoints: entries, outdir: resolve(root, 'build/commands'), outExtension: { '.js': '.mjs' } });
}
