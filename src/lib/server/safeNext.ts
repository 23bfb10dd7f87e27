/** Where to go after sign-in: an address of this site, else the start. An address elsewhere would make us a signpost for fraud. */
export function safeNext(next: string | null | undefined, siteOrigin: string, start = '/studies'): string {
	if (next == null || !next.startsWith('/')) return start;
	const target = URL.canParse(next, siteOrigin) ? new URL(next, siteOrigin) : null;
	return target?.origin === siteOrigin ? target.pathname + target.search : start;
}
