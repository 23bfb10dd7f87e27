import { json } from '@sveltejs/kit';
import { heldRuntime } from '#lib/server/heldRuntime.ts';
import { describeError, log } from '#lib/server/log.ts';
import { ping } from '#lib/server/repositories/health.ts';
import { version } from '#lib/server/version.ts';
import type { RequestHandler } from './$types';

/** For a load balancer: no names, no paths, no secrets. */
export const GET: RequestHandler = async () => {
	const headers = { 'cache-control': 'no-store' };
	const held = heldRuntime();
	try {
		if (held === undefined) throw new Error('Expected an open runtime.');
		await ping();
		return json({ status: 'ok', database: held.database.kind, queue: 'ok', version: version() }, { headers });
	} catch (thrown) {
		log('error', 'health', describeError(thrown));
		return json(
			{ status: 'unavailable', database: 'unavailable', queue: 'unavailable', version: version() },
			{ status: 503, headers }
		);
	}
};
