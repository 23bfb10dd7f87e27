/** `npm run reset-passphrase EMAIL`: gives an account a new random passphrase and ends its sessions. */
import { EnvironmentError, readEnvironment } from '#lib/server/env.ts';
import { hashPassphrase, randomPassphrase } from '#lib/server/passphrase.ts';
import * as users from '#lib/server/repositories/users.ts';
import { runCommand } from '#lib/server/runCommand.ts';
import { closeRuntime, openRuntime } from '#lib/server/runtime.ts';

await runCommand(async () => {
	const email = process.argv[2];
	if (email === undefined) throw new EnvironmentError('Name the account: npm run reset-passphrase name@example.org');
	await openRuntime({ ...readEnvironment(), command: 'npm run reset-passphrase', works: false });
	const passphrase = randomPassphrase();
	if (!(await users.resetPassphrase(email, await hashPassphrase(passphrase)))) {
		throw new EnvironmentError(`No account has the address ${email} in this data folder.`);
	}
	await closeRuntime();
	process.stdout.write(`New passphrase of ${email}: ${passphrase}\nEvery session of the account is ended.\n`);
});
