/** Child process: takes the lock of the folder named on the command line and keeps it. */
import { LockedError, takeLock } from '#lib/server/lock.ts';

try {
	takeLock(process.argv[2] ?? '', process.argv[3] ?? 'a child');
	process.stdout.write('holding\n');
	setInterval(() => undefined, 1000);
	process.on('SIGTERM', () => process.exit(0));
} catch (thrown) {
	if (!(thrown instanceof LockedError)) throw thrown;
	process.stderr.write(`${thrown.message}\n`);
	process.exit(1);
}
