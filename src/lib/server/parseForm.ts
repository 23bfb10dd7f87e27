import type { z } from 'zod';

export type ParsedForm<Value> =
	| { readonly ok: true; readonly value: Value }
	| {
			readonly ok: false;
			/** what was typed, to be shown again; never a passphrase */
			readonly values: Readonly<Record<string, string>>;
			/** one sentence a field */
			readonly faults: Readonly<Record<string, string>>;
	  };

const SECRET_FIELD = /passphrase|password|token/i;

/** Reads a posted form by its schema. Files are left out: they come by their own requests. */
export async function parseForm<Schema extends z.ZodType>(
	request: Request,
	schema: Schema
): Promise<ParsedForm<z.infer<Schema>>> {
	const form = await request.formData();
	const entries = [...form].flatMap(([name, value]) => (typeof value === 'string' ? [[name, value] as const] : []));
	const given = Object.fromEntries(entries);
	const parsed = schema.safeParse(given);
	if (parsed.success) return { ok: true, value: parsed.data };
	const faults: Record<string, string> = {};
	for (const problem of parsed.error.issues) faults[String(problem.path[0] ?? 'form')] ??= problem.message;
	return { ok: false, values: withoutSecrets(given), faults };
}

export function withoutSecrets(given: Readonly<Record<string, string>>): Record<string, string> {
	return Object.fromEntries(Object.entries(given).filter(([name]) => !SECRET_FIELD.test(name)));
}
