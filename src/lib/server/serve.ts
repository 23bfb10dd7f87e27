import { createServer, type RequestListener, type Server } from 'node:http';
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { EnvironmentError, prepareSiteVariables, type Environment } from './env.ts';
import { projectRoot } from './folders.ts';

/** Only our own server sets it: whatever a client sends under this name is overwritten. */
const SCHEME_HEADER = 'x-kithline-scheme';
/** How long answers under way may take after the end was asked for. */
const LAST_ANSWERS_MS = 1_500;

export type Site = {
	/** address a person can open */
	readonly address: string;
	/** takes no more requests and ends those that last */
	readonly close: () => Promise<void>;
};

/** Serves the built site. The runtime must be open: the site uses it as it stands. */
export async function serveSite(environment: Environment): Promise<Site> {
	const handler = await loadHandler(environment);
	const server = createServer((request, response) => {
		request.headers[SCHEME_HEADER] = 'http';
		response.setHeader('x-content-type-options', 'nosniff');
		handler(request, response);
	});
	// An upload of 256 MiB over a slow line may take its time; a silent connection may not.
	server.requestTimeout = 0;
	await listen(server, environment);
	return { address: environment.origin ?? addressOf(server, environment.host), close: () => close(server) };
}

async function loadHandler(environment: Environment): Promise<RequestListener> {
	const path = join(projectRoot(), 'build', 'handler.js');
	if (!existsSync(path)) throw new EnvironmentError(`The site is not built yet: ${path} is missing. Run "npm run build" first.`);
	prepareSiteVariables(environment, SCHEME_HEADER);
	const built: { handler: RequestListener } = await import(pathToFileURL(path).href);
	return built.handler;
}

function listen(server: Server, { host, port }: Environment): Promise<void> {
	return new Promise((listening, failed) => {
		server.once('error', (cause) => {
			const isTaken = 'code' in cause && cause.code === 'EADDRINUSE';
			failed(isTaken ? new EnvironmentError(`Port ${port} on ${host} is in use; set PORT to another one.`) : cause);
		});
		server.listen(port, host, listening);
	});
}

function addressOf(server: Server, host: string): string {
	const bound = server.address();
	const port = bound !== null && typeof bound === 'object' ? bound.port : 0;
	return `http://${host.includes(':') ? `[${host}]` : host}:${port}`;
}

async function close(server: Server): Promise<void> {
	const closed = new Promise<void>((done) => server.close(() => done()));
	server.closeIdleConnections();
	const timer = setTimeout(() => server.closeAllConnections(), LAST_ANSWERS_MS);
	await closed;
	clearTimeout(timer);
}
