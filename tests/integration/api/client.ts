import type { z } from 'zod';
import { problemSchema, type Problem } from '#lib/contracts/answers.ts';
import type { Person } from './people.ts';

type Sent = {
	readonly body?: unknown;
	readonly raw?: string;
	readonly headers?: Record<string, string>;
	readonly method?: string;
};

export type Client = {
	readonly fetch: (path: string, sent?: Sent) => Promise<Response>;
	/** the answer, checked against the schema that describes it */
	readonly get: <Schema extends z.ZodType>(path: string, schema: Schema) => Promise<z.output<Schema>>;
	readonly post: <Schema extends z.ZodType>(path: string, body: unknown, schema: Schema) => Promise<z.output<Schema>>;
	/** the problem with which a request is turned down */
	readonly refusal: (path: string, sent?: Sent) => Promise<Problem>;
};

/** Calls the API as a script of this person does; null is a script without a token. */
export function clientOf(origin: string, person: Person | null): Client {
	const ask = (path: string, { body, raw, headers = {}, method }: Sent = {}) => {
		const text = raw ?? (body === undefined ? null : JSON.stringify(body));
		const authorization = person === null ? {} : { authorization: `Bearer ${person.token}` };
		const type = text === null ? {} : { 'content-type': 'application/json' };
		return fetch(`${origin}/api/v1${path}`, {
			method: method ?? (text === null ? 'GET' : 'POST'),
			headers: { ...authorization, ...type, ...headers },
			body: text
		});
	};
	const read = async <Schema extends z.ZodType>(response: Response, schema: Schema): Promise<z.output<Schema>> => {
		const text = await response.text();
		if (!response.ok) throw new Error(`Expected an answer; got ${response.status}: ${text.slice(0, 500)}`);
		return schema.parse(JSON.parse(text));
	};
	return {
		fetch: ask,
		get: async (path, schema) => read(await ask(path), schema),
		post: async (path, body, schema) => read(await ask(path, { body }), schema),
		refusal: async (path, sent) => {
			const response = await ask(path, sent);
			const text = await response.text();
			if (response.headers.get('content-type') !== 'application/problem+json') {
				throw new Error(
					`Expected a problem; got ${response.status} ${response.headers.get('content-type')}: ${text.slice(0, 500)}`
				);
			}
			const problem = problemSchema.parse(JSON.parse(text));
			if (problem.status !== response.status)
				throw new Error(`Expected one status; got ${response.status} and ${problem.status}.`);
			return problem;
		}
	};
}
