import { answering, onlyMethods } from '#lib/server/api/answering.ts';
import { csvResponse } from '#lib/server/api/csv.ts';
import { finished } from '#lib/server/api/finished.ts';
import { noteExport } from '#lib/server/api/noteExport.ts';
import { cladeLines } from '#lib/server/api/cladeLines.ts';
import { can } from '#lib/server/permissions.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = answering(async ({ params, locals }) => {
	const access = await can(locals.user, 'download', { analysis: params.analysis });
	const { id, result } = await finished(access, params.analysis);
	await noteExport(access, { analysis: id, file: 'clades.csv' });
	return csvResponse('clades.csv', cladeLines(result));
});

export const fallback: RequestHandler = onlyMethods('GET');
