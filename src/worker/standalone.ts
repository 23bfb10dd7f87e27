import { EnvironmentError, readEnvironment } from '#lib/server/env.ts';
import { endOnSignal } from '#lib/server/runCommand.ts';
import { openRuntime } from '#lib/server/runtime.ts';

/** A process that only works on analyses. It needs a PostgreSQL server: the embedded database belongs to one process. */
export async function workAlone(): Promise<void> {
	const environment = readEnvironment();
	if (environment.databaseUrl === null) {
		throw new EnvironmentError(
			'A separate worker needs DATABASE_URL; with the embedded database the server itself does the work.'
		);
	}
	const { pool } = await openRuntime({ ...environment, command: 'npm run worker' });
	endOnSignal(async () => undefined);
	// The worker's own timers do not keep a process alive.
	setInterval(() => undefined, 60_000);
	process.stdout.write(`Working on analyses with ${pool.threads} threads\n`);
}
