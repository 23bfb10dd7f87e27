import { createHash, randomUUID } from 'node:crypto';
import { constants, existsSync } from 'node:fs';
import { cp, mkdir, readFile, readdir, rename, rm } from 'node:fs/promises';
import { dirname, join, sep } from 'node:path';
import { fileURLToPath } from 'node:url';
import { projectRoot } from '#lib/server/folders.ts';
import { makeEmbeddedDatabase } from './embedded.ts';

/**
 * Making a database from nothing takes 9 to 20 s, copying a prepared one about 2 s. The template is that prepared folder:
 * migrated, with the queue's own tables. It is named after everything it was made from, so a changed migration or
 * database version never meets an old template.
 */
export async function copyTemplate(target: string): Promise<void> {
	const template = await existingTemplate();
	const draft = `${target}.partial-${randomUUID()}`;
	await mkdir(dirname(target), { recursive: true, mode: 0o700 });
	await cp(template, draft, { recursive: true, mode: constants.COPYFILE_FICLONE });
	await rename(draft, target);
}

/** Makes the template in `folder` unless it is there; returns its own folder. Safe when several processes do it at once. */
export async function makeTemplate(folder: string): Promise<string> {
	const template = join(folder, await templateKey());
	if (existsSync(template)) return template;
	const draft = join(folder, `draft-${randomUUID()}`);
	await mkdir(folder, { recursive: true });
	await makeEmbeddedDatabase(draft);
	await rename(draft, template).catch(async (cause: unknown) => {
		await rm(draft, { recursive: true, force: true });
		if (!existsSync(template)) throw cause;
	});
	await removeOthers(folder, template);
	return template;
}

/** Where `npm run build` puts the template. */
export function builtTemplates(): string {
	return join(projectRoot(), 'build', 'database-template');
}

async function existingTemplate(): Promise<string> {
	const built = join(builtTemplates(), await templateKey());
	if (runsFromBuild() && existsSync(built)) return built;
	return makeTemplate(join(projectRoot(), '.svelte-kit', 'kithline', 'database-template'));
}

export function runsFromBuild(): boolean {
	return fileURLToPath(import.meta.url).startsWith(join(projectRoot(), 'build') + sep);
}

async function templateKey(): Promise<string> {
	const hash = createHash('sha256');
	const migrations = join(projectRoot(), 'drizzle');
	for (const name of (await readdir(migrations)).filter((file) => file.endsWith('.sql')).sort()) {
		hash.update(name).update(await readFile(join(migrations, name)));
	}
	const manifest: { dependencies: Record<string, string> } = JSON.parse(
		await readFile(join(projectRoot(), 'package.json'), 'utf8')
	);
	hash.update(`${manifest.dependencies['@electric-sql/pglite']} ${manifest.dependencies['pg-boss']}`);
	return hash.digest('hex').slice(0, 16);
}

/** Old templates go; a draft that another process is writing now stays. */
async function removeOthers(folder: string, template: string): Promise<void> {
	const names = await readdir(folder);
	const old = names.filter((name) => join(folder, name) !== template && !name.startsWith('draft-'));
	await Promise.all(old.map((name) => rm(join(folder, name), { recursive: true, force: true })));
}
