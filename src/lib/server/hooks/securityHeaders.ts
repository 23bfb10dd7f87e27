/** Answers that are no page: nothing in them may load or run anything. Pages get theirs, with nonces, from SvelteKit. */
const NOTHING_RUNS = "default-src 'none'; frame-ancestors 'none'; base-uri 'none'";
const YEAR_SECONDS = 31_536_000;

export type HeaderSituation = { readonly isHttps: boolean; readonly isSignedIn: boolean };

/** Puts the headers on an answer that every answer has; leaves alone what a route has set with a purpose. */
export function addSecurityHeaders(headers: Headers, { isHttps, isSignedIn }: HeaderSituation): void {
	headers.set('x-content-type-options', 'nosniff');
	headers.set('x-frame-options', 'DENY');
	headers.set('cross-origin-opener-policy', 'same-origin');
	headers.set('permissions-policy', 'camera=(), geolocation=(), microphone=(), payment=()');
	if (!headers.has('referrer-policy')) headers.set('referrer-policy', 'strict-origin-when-cross-origin');
	if (!headers.has('content-security-policy'))
		headers.set('content-security-policy', policyFor(headers.get('content-type') ?? ''));
	if (isHttps) headers.set('strict-transport-security', `max-age=${YEAR_SECONDS}; includeSubDomains`);
	if (isSignedIn && !headers.has('cache-control')) headers.set('cache-control', 'private, no-store');
}

function policyFor(contentType: string): string {
	if (!contentType.startsWith('text/html')) return NOTHING_RUNS;
	return [
		"default-src 'self'",
		"script-src 'self' 'unsafe-inline'",
		"style-src 'self' 'unsafe-inline'",
		"img-src 'self' data: blob:",
		"object-src 'none'",
		"base-uri 'none'",
		"form-action 'self'",
		"frame-ancestors 'none'"
	].join('; ');
}
