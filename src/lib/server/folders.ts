import { existsSync, readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

let found: string | null = null;

/** The folder of the program: the nearest one above this file whose package.json is named kithline. */
export function projectRoot(): string {
	found ??= climb(dirname(fileURLToPath(import.meta.url)));
	return found;
}

function climb(folder: string): string {
	const manifest = join(folder, 'package.json');
	if (existsSync(manifest) && JSON.parse(readFileSync(manifest, 'utf8')).name === 'kithline') return folder;
	const parent = dirname(folder);
	if (parent === folder) throw new Error('Expected a package.json named kithline above the program; found none.');
	return climb(parent);
}
