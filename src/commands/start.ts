/** `npm start`: opens the data folder and serves the built site. */
import { EnvironmentError, readEnvironment } from '#lib/server/env.ts';
import * as users from '#lib/server/repositories/users.ts';
import { endOnSignal, runCommand } from '#lib/server/runCommand.ts';
import { openRuntime } from '#lib/server/runtime.ts';
import { serveSite } from '#lib/server/serve.ts';

await runCommand(async () => {
	const environment = readEnvironment();
	await openRuntime({ ...environment, command: 'npm start' });
	if (!environment.isLoopback && (await users.hasDemoAccounts())) {
		throw new EnvironmentError(
			`The data in ${environment.dataFolder} hold the demo accounts, whose passphrase everybody knows: set KITHLINE_DATA to another folder, or HOST to 127.0.0.1.`
		);
	}
	const site = await serveSite(environment);
	endOnSignal(site.close);
	process.stdout.write(`Kithline is at ${site.address}\n`);
});
