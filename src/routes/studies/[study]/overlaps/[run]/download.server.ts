import { error } from '@sveltejs/kit';
import type { PairMatrix } from '#lib/overlap/pairMatrix.ts';
import { attachment } from '#lib/server/api/csv.ts';
import { can } from '#lib/server/permissions.ts';
import * as logBook from '#lib/server/repositories/logBook.ts';
import * as openings from '#lib/server/repositories/openings.ts';
import { matrixOf } from '#lib/server/repositories/overlapRunRows.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import { NOT_FOUND } from './runActions.server.ts';

type Asked = { readonly locals: App.Locals; readonly params: { readonly study: string; readonly run: string } };
type Written = { readonly file: string; readonly write: (matrix: PairMatrix) => string };

/** The values of a run as a file; everything that leaves as a file is in the log book. */
export async function download({ locals, params }: Asked, { file, write }: Written): Promise<Response> {
	const access = await can(locals.user, 'download', { study: params.study });
	const run = await overlapRuns.find(access, params.run);
	if (run === null) error(404, NOT_FOUND);
	await openings.note(access, run, 'file');
	await logBook.append(access, { action: 'exported', detail: { overlapRun: run.id, file } });
	const headers = {
		'content-type': 'text/csv; charset=utf-8; header=present',
		'content-disposition': attachment(`${run.label.replace(/[\\/:*?"<>|]+/g, '-')} ${file}`),
		'cache-control': 'private, no-store'
	};
	return new Response(write(matrixOf(run)), { headers });
}
