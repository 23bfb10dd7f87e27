import { mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, resolve } from 'node:path';
import { exampleFiles } from './examples/exampleFiles.ts';

/** Writes static/examples anew. Run from the root of the repository, as `npm run examples` does. */
const folder = resolve('static/examples');
const files = exampleFiles();
rmSync(folder, { recursive: true, force: true });
for (const { path, text } of files) {
	const target = resolve(folder, path);
	mkdirSync(dirname(target), { recursive: true });
	writeFileSync(target, text);
}
const kib = files.reduce((sum, { text }) => sum + Buffer.byteLength(text), 0) / 1024;
console.log(`Wrote ${files.length} files, ${Math.round(kib)} KiB, to ${folder}.`);
