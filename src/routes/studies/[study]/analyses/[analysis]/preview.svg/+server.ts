import { plateQuerySchema } from '#lib/contracts/answers.ts';
import { plateSettings } from '#lib/server/api/answerPlate.ts';
import { answering } from '#lib/server/api/answering.ts';
import { finished } from '#lib/server/api/finished.ts';
import { readQuery } from '#lib/server/api/readQuery.ts';
import { renderPlateSvg } from '#lib/server/exports/plateSvg.ts';
import { can } from '#lib/server/permissions.ts';
import type { RequestHandler } from './$types';

/** The plate as the export draws it, to be looked at on a page. Looking is no download, so the log book is not told. */
export const GET: RequestHandler = answering(async ({ params, url, locals }) => {
	const access = await can(locals.user, 'read', { study: params.study });
	const { width, age, palette, type } = readQuery(url, plateQuerySchema);
	const { result } = await finished(access, params.analysis);
	const svg = renderPlateSvg(result, plateSettings(result, { widthMm: width, age, palette, typeSizePt: type }));
	return new Response(svg, {
		headers: {
			'content-type': 'image/svg+xml',
			// A result never changes, and the address holds every setting.
			'cache-control': 'private, max-age=3600',
			'content-security-policy': "default-src 'none'; style-src 'unsafe-inline'; img-src data:; sandbox"
		}
	});
});
