/** `npm run demo`: a data folder with invented studies and three accounts, served on this machine only. */
import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import { DEMO_ACCOUNTS, DEMO_PASSPHRASE, seedDemoLab } from '#lib/server/demoLab.ts';
import { loadExamples } from '#lib/server/exampleStudies.ts';
import { EnvironmentError, readEnvironment } from '#lib/server/env.ts';
import { endOnSignal, runCommand } from '#lib/server/runCommand.ts';
import * as users from '#lib/server/repositories/users.ts';
import { openRuntime } from '#lib/server/runtime.ts';
import { serveSite } from '#lib/server/serve.ts';

/** What the main job found, one number a line. */
function mainJobLines({ regression, permutation, species, pairs, finding }: AnalysisResult): string {
	const split = permutation.withinDeepestSplit;
	return [
		'Main job: overlap of the lanternfrogs against the age of their common ancestors',
		`slope ${regression.slope} per Myr`,
		`p ${permutation.p} (${permutation.count} shuffles)`,
		...(split === null ? [] : [`p within the deepest split ${split.pLess}`]),
		`n ${species} species, ${pairs} pairs`,
		`${finding.title}.`,
		''
	].join('\n');
}

await runCommand(async () => {
	const environment = readEnvironment(process.env, { dataFolder: './data-demo' });
	if (!environment.isLoopback || environment.origin !== null) {
		throw new EnvironmentError(
			'The demo is for this machine only, because everybody knows its passphrase: leave HOST and ORIGIN unset.'
		);
	}
	await openRuntime({ ...environment, command: 'npm run demo', isDemo: true });
	const { lab, lead } = await seedDemoLab();
	const holder = await users.sessionHolder(lead);
	if (holder === null) throw new Error('Expected the lead of the demo to have an account.');
	const { result } = await loadExamples(holder.user, lab);
	process.stdout.write(mainJobLines(result));
	const site = await serveSite(environment);
	endOnSignal(site.close);
	const accounts = DEMO_ACCOUNTS.map(({ email }) => email).join(', ');
	process.stdout.write(`\nKithline is at ${site.address}\nAccounts: ${accounts}\nPassphrase of each: ${DEMO_PASSPHRASE}\n`);
});
