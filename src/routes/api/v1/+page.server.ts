import { CALLS } from '#lib/server/api/calls.ts';
import { PROBLEM_TITLES } from '#lib/server/api/problemResponse.ts';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = () => ({
	calls: CALLS.map(({ method, path, does, needsToken, body, answers }) => ({
		method: method.toUpperCase(),
		path: `/api/v1${path}`,
		does,
		needsToken,
		hasBody: body !== undefined,
		statuses: answers.map(({ status, means }) => `${status} ${means}`)
	})),
	problems: Object.entries(PROBLEM_TITLES).map(([status, title]) => ({ status, title }))
});
