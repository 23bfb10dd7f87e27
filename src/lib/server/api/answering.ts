import { isHttpError, isRedirect } from '@sveltejs/kit';
import { randomUUID } from 'node:crypto';
import { InputError } from '#lib/remarks/inputError.ts';
import { remark } from '#lib/remarks/remark.ts';
import { ComputeRefusedError } from '#lib/server/jobs/pool.ts';
import { askedFrom } from '#lib/server/requestScope.ts';
import { describeError, log } from '#lib/server/log.ts';
import { problemResponse } from './problemResponse.ts';
import { Refusal } from './refusal.ts';
import { isStorable } from './refuseUnstorable.ts';

type Asked = { readonly params: Partial<Record<string, string>>; readonly url: URL; readonly request: Request };

const CODES: Readonly<Record<number, string>> = {
	400: 'malformed-request',
	401: 'not-signed-in',
	403: 'not-allowed',
	404: 'not-found',
	413: 'too-large',
	422: 'data-do-not-allow-it',
	429: 'too-many-attempts'
};

export const NOT_FOUND = 'Nothing at this address, or it is not yours to see.';

/** A handler of `/api/v1`: whatever goes wrong in it is answered as problem+json, with a sentence and never a stack. */
export function answering<Event extends Asked>(act: (event: Event) => Promise<Response>): (event: Event) => Promise<Response> {
	return async (event) => {
		try {
			refuseOddAddress(event.params);
			return await act(event);
		} catch (thrown) {
			if (isRedirect(thrown)) throw thrown;
			return problemOf(thrown, event);
		}
	};
}

/** What the database cannot hold cannot be the id of anything. */
function refuseOddAddress(params: Asked['params']): void {
	for (const value of Object.values(params)) {
		if (value !== undefined && !isStorable(value)) throw new Refusal(404, 'not-found', NOT_FOUND);
	}
}

function problemOf(thrown: unknown, event: Asked): Response {
	if (thrown instanceof Refusal) {
		const { status, code, message: detail, remarks, headers } = thrown;
		return problemResponse({ status, code, detail, remarks, headers });
	}
	if (thrown instanceof InputError) return inputProblem(thrown);
	if (isHttpError(thrown) && thrown.status < 500) {
		return problemResponse({ status: thrown.status, code: CODES[thrown.status] ?? 'refused', detail: thrown.body.message });
	}
	return defect(thrown, event);
}

/** A refusal that lists what stands in the way brings its own remarks. */
function inputProblem(thrown: InputError): Response {
	const { code, message, where } = thrown;
	const listed = thrown instanceof ComputeRefusedError ? thrown.remarks : [];
	const remarks = listed.length > 0 ? listed : [remark('settle', code, message, where)];
	return problemResponse({ status: 422, code, detail: message, remarks });
}

function defect(thrown: unknown, { request, url }: Asked): Response {
	const reference = askedFrom()?.reference ?? randomUUID();
	log('error', 'api-defect', { reference, method: request.method, path: url.pathname, ...describeError(thrown) });
	const detail = `Something went wrong on our side. Nothing you sent is at fault; please quote the reference ${reference}.`;
	return problemResponse({ status: 500, code: 'defect', detail, reference });
}

/** Answers every method a route does not name; the address itself is right, so the sentence names the ones it takes. */
export function onlyMethods(...methods: readonly string[]): (event: Asked) => Response {
	return ({ request }) =>
		problemResponse({
			status: 405,
			code: 'method-not-allowed',
			detail: `Expected ${methods.join(' or ')} at this address; got ${request.method}.`,
			headers: { allow: methods.join(', ') }
		});
}

/** A JSON answer of the API; never kept by a cache that others share. */
export function answerJson(value: unknown, status = 200): Response {
	return new Response(JSON.stringify(value), {
		status,
		headers: { 'content-type': 'application/json', 'cache-control': 'private, no-store' }
	});
}
