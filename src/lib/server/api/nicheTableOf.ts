import type { Access } from '#lib/server/access.ts';
import type { KeptNicheTable } from '#lib/server/repositories/nicheTableRows.ts';
import * as nicheTables from '#lib/server/repositories/nicheTables.ts';
import { notInStudy } from './notInStudy.ts';
import { Refusal } from './refusal.ts';

/**
 * The table of niche positions that a plan names, or the newest.
 * @throws {Refusal} 404 for one that is not in the study · 422 `no-niche-table` when there is none
 */
export async function nicheTableOf(access: Access, id: string | undefined): Promise<KeptNicheTable> {
	const table = id === undefined ? (await nicheTables.list(access))[0] : await nicheTables.find(access, id);
	if (table) return table;
	if (id !== undefined) throw notInStudy('niche table', id);
	throw new Refusal(
		422,
		'no-niche-table',
		'Signal in niche position needs a table of niche positions: bring one with the materials.'
	);
}
