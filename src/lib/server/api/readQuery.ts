import type { z } from 'zod';
import { checked } from './checked.ts';

/** Keys of a query that may come several times, or once as a comma-separated list. */
type Options = { lists?: readonly string[] };

/** @throws {Refusal} 400 `malformed-query` on an unknown key or a value out of range */
export function readQuery<Schema extends z.ZodType>(url: URL, schema: Schema, { lists = [] }: Options = {}): z.output<Schema> {
	const given: [string, unknown][] = [];
	for (const key of new Set(url.searchParams.keys())) {
		const values = url.searchParams.getAll(key);
		given.push([key, lists.includes(key) ? listOf(values) : values.length === 1 ? values[0] : values]);
	}
	return checked(schema, Object.fromEntries(given), 'query');
}

function listOf(values: readonly string[]): string[] {
	const only = values.length === 1 ? values[0] : undefined;
	return only === undefined ? [...values] : only.split(',').map((name) => name.trim());
}
