/**
 * Compiles the AssemblyScript of this folder and writes the module, as base64 text, into `kernelBytes.ts` of the room
 * that runs it: so browser, server and compute thread have it without reading a file. Does nothing when that file was
 * made from the same sources. Vite's configuration, the bundler and `npm run kernel` call it.
 */
import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { pathToFileURL } from 'node:url';

const here = import.meta.dirname;
const target = resolve(here, '../lib/statistics/kernelBytes.ts');
const options = ['--runtime', 'stub', '-O3', '--noAssert', '--importMemory', '--enable', 'simd', '--use', 'abort='];

export async function compileKernel() {
	const files = readdirSync(here).filter((name) => /\.(ts|mjs)$/.test(name));
	const hash = createHash('sha256');
	for (const name of files.sort()) hash.update(name).update(readFileSync(join(here, name)));
	const made = `// Made by src/kernel/compileKernel.mjs from the sources with SHA-256 ${hash.digest('hex')}.`;
	if (existsSync(target) && readFileSync(target, 'utf8').startsWith(made)) return;

	// Loading the compiler takes longer than the question whether it is needed.
	const { default: asc } = await import('assemblyscript/asc');
	let bytes = null;
	const { error, stderr } = await asc.main([join(here, 'kernel.ts'), '--outFile', 'kernel.wasm', ...options], {
		writeFile: (name, contents) => {
			if (name.endsWith('.wasm')) bytes = contents;
		}
	});
	if (error || bytes === null) throw new Error(`The kernel does not compile.\n${stderr}`, { cause: error });
	const text = Buffer.from(bytes).toString('base64');
	// Two processes may compile at once: each writes a file of its own, and moving it into place is one step.
	const unfinished = `${target}.${process.pid}`;
	writeFileSync(unfinished, `${made}\nexport const KERNEL_BYTES = '${text}';\n`);
	renameSync(unfinished, target);
}

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) await compileKernel();
