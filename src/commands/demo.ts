/** `npm run demo`: a data folder with invented studies and three accounts, served on this machine only. */
import { DEMO_ACCOUNTS, DEMO_PASSPHRASE, seedDemoLab } from '#lib/server/demoLab.ts';
import { EnvironmentError, readEnvironment } from '#lib/server/env.ts';
import { endOnSignal, runCommand } from '#lib/server/runCommand.ts';
import { openRuntime } from '#lib/server/runtime.ts';
import { serveSite } from '#lib/server/serve.ts';

await runCommand(async () => {
	const environment = readEnvironment(process.env, { dataFolder: './data-demo' });
	if (!environment.isLoopback || environment.origin !== null) {
		throw new EnvironmentError(
			'The demo is for this machine only, because everybody knows its passphrase: leave HOST and ORIGIN unset.'
		);
	}
	await openRuntime({ ...environment, command: 'npm run demo', isDemo: true });
	await seedDemoLab();
	const site = await serveSite(environment);
	endOnSignal(site.close);
	const accounts = DEMO_ACCOUNTS.map(({ email }) => email).join(', ');
	process.stdout.write(`\nKithline is at ${site.address}\nAccounts: ${accounts}\nPassphrase of each: ${DEMO_PASSPHRASE}\n`);
});
