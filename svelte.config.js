import adapter from '@sveltejs/adapter-node';
import { vitePreprocess } from '@sveltejs/vite-plugin-svelte';

/** @type {import('@sveltejs/kit').Config} */
export default {
	preprocess: vitePreprocess(),
	kit: {
		adapter: adapter({ out: 'build', precompress: true }),
		// Scripts may post forms without an Origin header; src/lib/server/hooks checks the origin of every cookie request.
		csrf: { trustedOrigins: ['*'] }
	}
};
