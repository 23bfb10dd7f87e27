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
	const given = fieldsOf(await request.formData());
	const parsed = schema.safeParse(given);
	if (parsed.success) return { ok: true, value: parsed.data };
	const faults: Record<string, string> = {};
	for (const problem of parsed.error.issues) faults[String(problem.path[0] ?? 'form')] ??= problem.message;
	return { ok: false, values: withoutSecrets(given), faults };
}

/** The fields as text; one that is given several times, as boxes that are ticked, a line each. */
export function fieldsOf(form: FormData): Record<string, string> {
	const lines = new Map<string, string[]>();
	for (const [name, value] of form) {
		if (typeof value === 'string') lines.set(name, [...(lines.get(name) ?? []), value]);
	}
	return Object.fromEntries([...lines].map(([name, values]) => [name, values.join('\n')]));
}

export function withoutSecrets(given: Readonly<Record<string, string>>): Record<string, string> {
	return Object.fromEntries(Object.entries(given).filter(([name]) => !SECRET_FIELD.test(name)));
}
