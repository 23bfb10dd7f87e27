import type { z } from 'zod';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { Refusal } from './refusal.ts';

/** How many faults of one body are listed; the rest is counted. */
const LISTED_FAULTS = 10;

/**
 * The value as the schema has it: defaults written out, nothing extra.
 * @throws {Refusal} 400 `malformed-body` or `malformed-query`, with every fault as a remark
 */
export function checked<Schema extends z.ZodType>(schema: Schema, value: unknown, what: 'body' | 'query'): z.output<Schema> {
	const read = schema.safeParse(value);
	if (read.success) return read.data;
	const faults = read.error.issues.map((fault) => faultRemark(fault, what));
	const first = faults[0]?.message ?? `The ${what} is not as described.`;
	const more = faults.length > 1 ? ` ${faults.length - 1} more of this kind: see \`remarks\`.` : '';
	throw new Refusal(400, `malformed-${what}`, first + more, { remarks: faults.slice(0, LISTED_FAULTS) });
}

function faultRemark(fault: z.core.$ZodIssue, what: string): Remark {
	const path = fault.path.map(String).join('.');
	const field = path === '' ? `the ${what}` : `\`${path}\``;
	return remark('settle', `malformed-${what}`, `In ${field}: ${faultSentence(fault)}`, path === '' ? undefined : { name: path });
}

function faultSentence(fault: z.core.$ZodIssue): string {
	if (fault.code === 'unrecognized_keys') {
		return `expected only the described fields; got also ${fault.keys.map((key) => `\`${key.slice(0, 80)}\``).join(', ')}.`;
	}
	return fault.message.endsWith('.') ? fault.message : `${fault.message}.`;
}
