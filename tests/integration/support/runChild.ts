import { spawn, type ChildProcess } from 'node:child_process';
import { join } from 'node:path';

export type Child = {
	readonly process: ChildProcess;
	/** what it has written to standard output and standard error so far */
	readonly output: () => string;
	/** ends when `text` appears in the output */
	readonly says: (text: string) => Promise<void>;
	readonly ended: Promise<{ code: number | null; signal: NodeJS.Signals | null }>;
};

const root = join(import.meta.dirname, '..', '..', '..');

/** Runs a TypeScript file of this folder as a process of its own. */
export function runChild(file: string, args: readonly string[]): Child {
	const child = spawn(process.execPath, ['--import', 'tsx', join(import.meta.dirname, file), ...args], { cwd: root });
	let text = '';
	const hear = (chunk: Buffer) => {
		text += chunk.toString();
		child.emit('said');
	};
	child.stdout.on('data', hear);
	child.stderr.on('data', hear);
	const ended = new Promise<{ code: number | null; signal: NodeJS.Signals | null }>((done) => {
		child.on('close', (code, signal) => done({ code, signal }));
	});
	const says = (wanted: string) =>
		new Promise<void>((heard, failed) => {
			const look = () => text.includes(wanted) && heard();
			child.on('said', look);
			child.on('close', () =>
				text.includes(wanted) ? heard() : failed(new Error(`Expected "${wanted}"; the process said: ${text}`))
			);
			look();
		});
	return { process: child, output: () => text, says, ended };
}
