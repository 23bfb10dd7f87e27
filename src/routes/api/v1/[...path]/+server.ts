import { problemResponse } from '#lib/server/api/problemResponse.ts';
import type { RequestHandler } from './$types';

/** Every other address under /api/v1, whatever the method. */
export const fallback: RequestHandler = ({ url }) =>
	problemResponse({
		status: 404,
		code: 'not-found',
		detail: `Nothing is at ${url.pathname.slice(0, 200)}. The calls are listed at /api/v1 and described at /api/v1/openapi.json.`
	});
