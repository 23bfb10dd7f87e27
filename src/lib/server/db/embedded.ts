import { PGlite } from '@electric-sql/pglite';
import { drizzle } from 'drizzle-orm/pglite';
import { migrate } from 'drizzle-orm/pglite/migrator';
import { join } from 'node:path';
import { projectRoot } from '#lib/server/folders.ts';
import type { ExecuteSql } from '#lib/server/jobs/queue.ts';
import { openQueue } from '#lib/server/jobs/queue.ts';
import * as tables from './schema.ts';

/** PostgreSQL's number for the type bytea. The driver's own conversion runs at 1 MiB/s; hexadecimal at 16 in and 54 out. */
const BYTEA = 17;

export function openPglite(folder: string): Promise<PGlite> {
	return PGlite.create({
		dataDir: folder,
		serializers: {
			[BYTEA]: (value: Uint8Array) => `\\x${Buffer.from(value.buffer, value.byteOffset, value.byteLength).toString('hex')}`
		},
		parsers: { [BYTEA]: (text: string) => Buffer.from(text.slice(2), 'hex') }
	});
}

/** Scripts without parameters hold several statements, which only `exec` accepts. */
export function embeddedSql(client: PGlite): ExecuteSql {
	return async (text, values) => {
		if (values !== undefined && values.length > 0) {
			const { rows } = await client.query<Record<string, unknown>>(text, [...values]);
			return { rows, rowCount: rows.length };
		}
		const results = await client.exec(text);
		const rows = results.at(-1)?.rows ?? [];
		return { rows, rowCount: rows.length };
	};
}

export function embeddedHandle(client: PGlite) {
	return drizzle(client, { schema: tables });
}

export async function migrateEmbedded(client: PGlite): Promise<void> {
	await migrate(embeddedHandle(client), { migrationsFolder: join(projectRoot(), 'drizzle') });
}

/** Makes a new database in `folder`: migrated, with the queue's tables, closed again. */
export async function makeEmbeddedDatabase(folder: string): Promise<void> {
	const client = await openPglite(folder);
	await migrateEmbedded(client);
	const queue = await openQueue(embeddedSql(client));
	await queue.close();
	await client.close();
}
