import { defineConfig } from '@playwright/test';
import { browserLaunch } from './tests/support/browserLaunch.ts';

const port = 4319;

export default defineConfig({
	testDir: 'tests/e2e',
	timeout: 90_000,
	expect: { timeout: 15_000 },
	fullyParallel: false,
	workers: 1,
	retries: 0,
	reporter: [['list']],
	use: {
		baseURL: `http://127.0.0.1:${port}`,
		launchOptions: browserLaunch
	},
	webServer: {
		command: 'node --import tsx tests/e2e/support/serveExample.ts',
		url: `http://127.0.0.1:${port}/health`,
		timeout: 120_000,
		reuseExistingServer: !process.env.CI,
		env: { PORT: String(port), HOST: '127.0.0.1', KITHLINE_DATA: 'test-results/data-browser' },
		gracefulShutdown: { signal: 'SIGTERM', timeout: 8_000 }
	}
});
