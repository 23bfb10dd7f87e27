import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import type { PgDatabase, PgQueryResultHKT } from 'drizzle-orm/pg-core';
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import pg from 'pg';
import { projectRoot } from '#lib/server/folders.ts';
import type { ExecuteSql } from '#lib/server/jobs/queue.ts';
import { describeError, log } from '#lib/server/log.ts';
import { embeddedHandle, embeddedSql, migrateEmbedded, openPglite } from './embedded.ts';
import * as tables from './schema.ts';
import { copyTemplate } from './template.ts';

/** What both drivers answer to a raw statement. */
type Rows<Row> = { rows: Row[] };
interface RowsHKT extends PgQueryResultHKT {
	type: Rows<this['row']>;
}

/** One type for both drivers, and for a transaction on either. */
export type Handle = PgDatabase<RowsHKT, typeof tables>;

export type Database = {
	readonly kind: 'embedded' | 'server';
	readonly handle: Handle;
	readonly executeSql: ExecuteSql;
	readonly close: () => Promise<void>;
};

export type DatabasePlace = { readonly dataFolder: string; readonly databaseUrl: string | null };

/** Opens the database of the data folder, or of the server at `databaseUrl`, and brings its schema up to date. */
export function openDatabase({ dataFolder, databaseUrl }: DatabasePlace): Promise<Database> {
	return databaseUrl === null ? openEmbedded(join(dataFolder, 'database')) : openServer(databaseUrl);
}

async function openEmbedded(folder: string): Promise<Database> {
	if (!existsSync(folder)) await copyTemplate(folder);
	const client = await openPglite(folder);
	await migrateEmbedded(client);
	return {
		kind: 'embedded',
		handle: embeddedHandle(client),
		executeSql: embeddedSql(client),
		close: () => client.close()
	};
}

async function openServer(url: string): Promise<Database> {
	const pool = new pg.Pool({ connectionString: url, max: 10 });
	// A connection that breaks while idle must not end the process; the next query opens a new one.
	pool.on('error', (cause) => log('warning', 'database-connection-lost', describeError(cause)));
	const handle = drizzle(pool, { schema: tables });
	await migrate(handle, { migrationsFolder: join(projectRoot(), 'drizzle') });
	return {
		kind: 'server',
		handle,
		executeSql: async (text, values) => {
			const result = await pool.query(text, values === undefined ? [] : [...values]);
			return Array.isArray(result)
				? { rows: result.at(-1)?.rows ?? [], rowCount: 0 }
				: { rows: result.rows, rowCount: result.rowCount ?? 0 };
		},
		close: () => pool.end()
	};
}
