import { sveltekit } from '@sveltejs/kit/vite';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig } from 'vitest/config';
import { computeBundle } from './esbuild.config.mjs';
import { compileKernel } from './src/kernel/compileKernel.mjs';

// Everything that vite starts, tests too, needs the kernel; it is compiled only when its sources have changed.
await compileKernel();

export default defineConfig({
	plugins: [tailwindcss(), computeBundle(), sveltekit()],
	build: { target: 'es2022' },
	test: {
		projects: [
			{
				extends: true,
				test: {
					name: 'node',
					environment: 'node',
					include: ['src/**/*.test.ts', 'tests/reference/**/*.test.ts', 'tests/architecture/**/*.test.ts'],
					exclude: ['src/**/*.svelte.test.ts'],
					testTimeout: 20_000
				}
			},
			{
				extends: true,
				resolve: { conditions: ['browser'] },
				test: {
					name: 'dom',
					environment: 'jsdom',
					include: ['src/**/*.svelte.test.ts'],
					setupFiles: ['tests/domSetup.ts']
				}
			},
			{
				extends: true,
				test: {
					name: 'integration',
					environment: 'node',
					include: ['tests/integration/**/*.test.ts'],
					testTimeout: 120_000,
					hookTimeout: 180_000,
					fileParallelism: false
				}
			},
			{
				extends: true,
				test: { name: 'bench', environment: 'node', include: [], benchmark: { include: ['tests/bench/**/*.bench.ts'] } }
			}
		]
	}
});
