import { EnvironmentError } from './env.ts';
import { LockedError } from './lock.ts';
import { closeRuntime } from './runtime.ts';

/** A process that cannot end in an orderly way within this time ends anyway; the next start repairs what is left. */
const LAST_MOMENT_MS = 5_000;

/** Runs a command; what the person can put right is one sentence on standard error and exit code 1. */
export async function runCommand(command: () => Promise<void>): Promise<void> {
	try {
		await command();
	} catch (thrown) {
		await closeRuntime();
		const isTheirs = thrown instanceof EnvironmentError || thrown instanceof LockedError;
		process.stderr.write(isTheirs ? `${thrown.message}\n` : `${thrown instanceof Error ? thrown.stack : String(thrown)}\n`);
		process.exit(1);
	}
}

/** On SIGTERM or SIGINT: `first`, then everything that is open, then the end. A second signal ends at once. */
export function endOnSignal(first: () => Promise<void>): void {
	let isEnding = false;
	const end = () => {
		if (isEnding) process.exit(1);
		isEnding = true;
		setTimeout(() => process.exit(1), LAST_MOMENT_MS).unref();
		void first()
			.catch(() => undefined)
			.then(closeRuntime)
			.then(() => process.exit(0));
	};
	process.on('SIGTERM', end);
	process.on('SIGINT', end);
}
