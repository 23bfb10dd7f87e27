import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { projectRoot } from './folders.ts';

let read: string | null = null;

/** The program's version, from its package.json. */
export function version(): string {
	read ??= String(JSON.parse(readFileSync(join(projectRoot(), 'package.json'), 'utf8')).version);
	return read;
}
