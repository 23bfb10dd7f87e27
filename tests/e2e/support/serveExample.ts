/** The demo as `npm run demo` serves it, on compute threads that end some analyses otherwise: see `endings.mjs`. */
import { join } from 'node:path';
import { seedDemoLab } from '#lib/server/demoLab.ts';
import { readEnvironment } from '#lib/server/env.ts';
import { loadExamples } from '#lib/server/exampleStudies.ts';
import * as users from '#lib/server/repositories/users.ts';
import { endOnSignal, runCommand } from '#lib/server/runCommand.ts';
import { openRuntime } from '#lib/server/runtime.ts';
import { serveSite } from '#lib/server/serve.ts';

/** One for readings, one for the analysis that never ends, one for the others. */
const THREADS = 3;

await runCommand(async () => {
	const environment = { ...readEnvironment(), workers: THREADS };
	const computeFile = join(import.meta.dirname, 'endings.mjs');
	await openRuntime({ ...environment, command: 'the browser tests', isDemo: true, computeFile });
	const { lab, lead } = await seedDemoLab();
	const holder = await users.sessionHolder(lead);
	if (holder === null) throw new Error('Expected the lead of the demo to have an account.');
	await loadExamples(holder.user, lab);
	const site = await serveSite(environment);
	endOnSignal(site.close);
	process.stdout.write(`The example is at ${site.address}\n`);
});
