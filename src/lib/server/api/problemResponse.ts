import type { Problem } from '#lib/contracts/answers.ts';
import type { Remark } from '#lib/remarks/remark.ts';

/** The statuses of the API with their titles, as the readable page lists them. */
export const PROBLEM_TITLES: Readonly<Record<number, string>> = {
	400: 'The request is malformed',
	401: 'No token, or one that does not hold',
	403: 'Your role does not allow this',
	404: 'Not there, or not yours to see',
	405: 'This address does not answer that method',
	413: 'Too large',
	422: 'The data do not allow it',
	429: 'Too many attempts',
	500: 'A defect of ours',
	503: 'Not ready'
};

export type ProblemFacts = {
	status: number;
	code: string;
	detail: string;
	remarks?: readonly Remark[];
	reference?: string;
	headers?: Readonly<Record<string, string>>;
};

/** @see RFC 9457, Problem Details for HTTP APIs */
export function problemResponse({ status, code, detail, remarks = [], reference, headers = {} }: ProblemFacts): Response {
	const problem: Problem = {
		type: `/api/v1#status-${status}`,
		title: PROBLEM_TITLES[status] ?? 'Refused',
		status,
		detail,
		code,
		remarks: [...remarks],
		...(reference === undefined ? {} : { reference })
	};
	return new Response(JSON.stringify(problem), {
		status,
		headers: { 'content-type': 'application/problem+json', 'cache-control': 'no-store', ...headers }
	});
}
