import { type Handle, type RequestEvent, text } from '@sveltejs/kit';
import { randomUUID } from 'node:crypto';
import { inRequest } from '#lib/server/requestScope.ts';
import { authenticate, bearerOf } from './authenticate.ts';
import { isForeignRequest } from './isForeignRequest.ts';
import { addSecurityHeaders } from './securityHeaders.ts';

const FOREIGN = 'This request came from another site, so nothing was changed. Open the page here and try again.';

/** Every request: who asks, whether it may come from where it comes from, and the headers of every answer. */
export const handleRequest: Handle = ({ event, resolve }) => {
	const isApi = event.url.pathname.startsWith('/api/');
	const path = event.url.pathname + event.url.search;
	return inRequest({ path, isApi, reference: randomUUID() }, async () => {
		const response = await answer(event, () => resolve(event, { preload: ({ type }) => type !== 'font' }));
		const isHttps = event.url.protocol === 'https:';
		addSecurityHeaders(response.headers, { isHttps, isSignedIn: event.locals.user !== null });
		return response;
	});
};

async function answer(event: RequestEvent, resolve: () => Response | Promise<Response>): Promise<Response> {
	const bearer = bearerOf(event.request);
	event.locals.viaToken = bearer !== null;
	event.locals.user = null;
	if (isForeignRequest(event.request, event.url.origin, bearer !== null)) return refuseForeign(event);
	event.locals.user = await authenticate(event, bearer);
	return resolve();
}

function refuseForeign({ url }: RequestEvent): Response {
	if (!url.pathname.startsWith('/api/')) return text(FOREIGN, { status: 403 });
	const problem = { type: 'about:blank', title: 'Forbidden', status: 403, detail: FOREIGN, remarks: [] };
	return new Response(JSON.stringify(problem), { status: 403, headers: { 'content-type': 'application/problem+json' } });
}
