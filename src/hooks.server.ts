import { building } from '$app/environment';
import type { ServerInit } from '@sveltejs/kit';
import { handleRequest } from '#lib/server/hooks/handleRequest.ts';
import { openForSite } from '#lib/server/hooks/openForSite.ts';
import { reportError } from '#lib/server/hooks/reportError.ts';

export const init: ServerInit = async () => {
	if (!building) await openForSite();
};
export const handle = handleRequest;
export const handleError = reportError;
