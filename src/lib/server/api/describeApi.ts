import { z } from 'zod';
import { problemSchema } from '#lib/contracts/answers.ts';
import { CALLS, type Call } from './calls.ts';
import { PROBLEM_TITLES } from './problemResponse.ts';

type Json = Record<string, unknown>;

/**
 * The OpenAPI 3.1 description, made from the very schemas that check bodies and shape answers.
 * @param origin - public address of this server
 */
export function describeApi(origin: string): Json {
	const paths: Record<string, Json> = {};
	for (const call of CALLS) paths[call.path] = { ...paths[call.path], [call.method]: describeCall(call) };
	return {
		openapi: '3.1.0',
		info: {
			title: 'Kithline',
			version: '1',
			description:
				'Does niche overlap fall as common ancestry grows older? Materials in, plan in, result out. ' +
				'Ages are in the unit of the tree set; names are as shown: an unquoted underscore is a blank.'
		},
		servers: [{ url: `${origin}/api/v1` }],
		paths,
		components: {
			schemas: { Problem: schemaOf(problemSchema, 'output') },
			securitySchemes: { token: { type: 'http', scheme: 'bearer', description: 'From the account page or POST /tokens.' } }
		}
	};
}

function describeCall({ id, does, path, query, body, answers, refusals, needsToken }: Call): Json {
	const responses: Record<string, Json> = {};
	for (const { status, means, content } of answers) responses[status] = { description: means, content: contentOf(content) };
	const always = needsToken ? [401, 403, 404] : [];
	for (const status of [...refusals, ...always].sort()) responses[status] = describeProblem(status);
	return {
		operationId: id,
		summary: does,
		parameters: [...pathParameters(path), ...(query === undefined ? [] : queryParameters(query))],
		...(body === undefined ? {} : { requestBody: { required: true, content: contentOf({ 'application/json': body }, 'input') } }),
		responses,
		security: needsToken ? [{ token: [] }] : []
	};
}

function describeProblem(status: number): Json {
	const schema = { $ref: '#/components/schemas/Problem' };
	return { description: PROBLEM_TITLES[status] ?? 'Refused', content: { 'application/problem+json': { schema } } };
}

function contentOf(content: Readonly<Record<string, z.ZodType | null>>, io: 'input' | 'output' = 'output'): Json {
	const entries = Object.entries(content).map(([type, schema]) => [
		type,
		schema === null ? {} : { schema: schemaOf(schema, io) }
	]);
	return Object.fromEntries(entries);
}

function schemaOf(schema: z.ZodType, io: 'input' | 'output'): Json {
	const { $schema: _, ...described } = z.toJSONSchema(schema, { io, unrepresentable: 'any' });
	return described;
}

function pathParameters(path: string): Json[] {
	return [...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => ({
		name,
		in: 'path',
		required: true,
		schema: name === 'format' ? { type: 'string', enum: ['svg', 'pdf', 'png'] } : { type: 'string' }
	}));
}

/** A query holds text; what the text must hold is said by the schema it is read into. */
function queryParameters(query: z.ZodObject): Json[] {
	return Object.entries(query.shape).map(([name, schema]) => ({
		name,
		in: 'query',
		required: false,
		schema: schemaOf(schema, 'output')
	}));
}
