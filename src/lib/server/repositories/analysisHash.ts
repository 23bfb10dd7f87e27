import { createHash } from 'node:crypto';

/**
 * SHA-256 of a value as canonical JSON: keys in order, no blanks. Equal values have equal hashes, however they were made.
 * @returns hexadecimal, 64 digits
 */
export function canonicalHash(value: unknown): string {
	return createHash('sha256').update(canonicalJson(value)).digest('hex');
}

/** Numbers are written as ECMAScript does, which RFC 8785 takes over. */
export function canonicalJson(value: unknown): string {
	if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`;
	if (typeof value !== 'object' || value === null) return JSON.stringify(value) ?? 'null';
	const entries = Object.entries(value).filter(([, held]) => held !== undefined);
	const sorted = entries.sort(([a], [b]) => (a < b ? -1 : 1));
	return `{${sorted.map(([key, held]) => `${JSON.stringify(key)}:${canonicalJson(held)}`).join(',')}}`;
}
