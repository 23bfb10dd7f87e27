/** Child process: opens the data folder named on the command line, queues the analysis named next and says when it works. */
import { enqueueAnalysis, watchAnalysis } from '#lib/server/jobs/analysisJobs.ts';
import { endOnSignal } from '#lib/server/runCommand.ts';
import { openRuntime } from '#lib/server/runtime.ts';
import { SLOW_COMPUTE, slowStore } from './slowStore.ts';

const [dataFolder = '', analysis = ''] = process.argv.slice(2);
const FOREVER = 1_000_000;
await openRuntime({
	dataFolder,
	databaseUrl: null,
	authSecret: null,
	workers: 1,
	command: 'a child',
	computeFile: SLOW_COMPUTE,
	store: slowStore({ steps: FOREVER, text: '' })
});
endOnSignal(async () => undefined);
await enqueueAnalysis(analysis);
for await (const event of watchAnalysis(analysis)) {
	if (event.type === 'progress') process.stdout.write('working\n');
}
