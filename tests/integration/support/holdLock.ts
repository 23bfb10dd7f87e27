/** Child process: takes the lock of the folder named on the command line and keeps it. */
import { LockedError, takeLock } from '#lib/server/lock.ts';

try {
	takeLock(process.argv[2] ?? '', process.argv[3] ?? 'a child');
	setInterval(() => undefined, 1000);
	// Before the word that the test waits for, else its signal may come first and end the process unheard.
	process.on('SIGTERM', () => process.exit(0));
	process.stdout.write('holding\n');
} catch (thrown) {
	if (!(thrown instanceof LockedError)) throw thrown;
	process.stderr.write(`${thrown.message}\n`);
	process.exit(1);
}
