const SAFE_METHODS = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Whether another site made the browser send this request. A browser names the origin of every request that can change
 * something, and attaches cookies by itself; a script with a token of its own cannot be tricked into anything.
 *
 * @param hasBearer - the request carries a token, and its cookies are not looked at
 */
export function isForeignRequest(request: Request, siteOrigin: string, hasBearer: boolean): boolean {
	if (SAFE_METHODS.has(request.method) || hasBearer) return false;
	const origin = request.headers.get('origin');
	if (origin !== null) return origin !== siteOrigin;
	// Some browsers leave the origin out of a request to the same site, but then say so here.
	const site = request.headers.get('sec-fetch-site');
	if (site !== null) return site !== 'same-origin';
	return request.headers.has('cookie');
}
