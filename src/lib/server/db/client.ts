import { AsyncLocalStorage } from 'node:async_hooks';
import { runtime } from '#lib/server/heldRuntime.ts';
import type { Handle } from './openDatabase.ts';

type Open = { readonly handle: Handle; isOpen: boolean };

/** The transaction that the running call belongs to. The embedded database has one connection: a query beside it would wait for ever. */
const current = new AsyncLocalStorage<Open>();

/** The database as the caller should use it: inside `transaction`, that transaction; else the open database. */
export function db(): Handle {
	const open = current.getStore();
	return open?.isOpen === true ? open.handle : runtime().database.handle;
}

export function isInTransaction(): boolean {
	return current.getStore()?.isOpen === true;
}

/**
 * Runs `work` in one transaction: all of its changes are kept, or none. Every `db()` inside it, however deep, is that
 * transaction. Work that outlives the call, such as a job it starts, uses the plain database again.
 */
export function transaction<Answer>(work: (tx: Handle) => Promise<Answer>): Promise<Answer> {
	return db().transaction(async (tx) => {
		const open: Open = { handle: tx, isOpen: true };
		try {
			return await current.run(open, () => work(tx));
		} finally {
			open.isOpen = false;
		}
	});
}
