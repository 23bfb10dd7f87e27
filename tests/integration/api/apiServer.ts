import { join } from 'node:path';
import { createServer } from 'vite';
import { openTestRuntime } from '../support/openTestRuntime.ts';
import { startPeople, type People } from './people.ts';

export type ApiServer = {
	readonly origin: string;
	readonly people: People;
	readonly stop: () => Promise<void>;
};

/**
 * The whole application on a data folder of its own. The runtime is opened here, so that a test can also look behind the
 * API; the site that vite serves meets it in the same process.
 */
export async function startApiServer(): Promise<ApiServer> {
	const runtime = await openTestRuntime();
	const people = await startPeople();
	const vite = await createServer({
		server: { host: '127.0.0.1', port: 0, watch: null, hmr: false },
		// Nothing is sent to a browser; what other runs have bundled ahead is left alone.
		cacheDir: join(runtime.folder, 'vite'),
		optimizeDeps: { noDiscovery: true, include: [] },
		ssr: { optimizeDeps: { noDiscovery: true, include: [] } },
		logLevel: 'error'
	});
	await vite.listen();
	// Test and server share one thread: while a test builds 65 MiB, the server must not take the connection for forgotten.
	if (vite.httpServer !== null && 'keepAliveTimeout' in vite.httpServer) vite.httpServer.keepAliveTimeout = 120_000;
	const address = vite.httpServer?.address();
	if (typeof address !== 'object' || address == null) throw new Error('Expected the server to listen; it does not.');
	const stop = async () => {
		await vite.close();
		await runtime.close();
	};
	return { origin: `http://127.0.0.1:${address.port}`, people, stop };
}
