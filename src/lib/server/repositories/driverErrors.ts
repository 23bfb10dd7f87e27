/** PostgreSQL's code for a value that a unique index holds already. */
const UNIQUE_VIOLATION = '23505';

/** Drizzle wraps what the driver threw; both drivers tell the code and the name of the index. */
export function isUniqueViolation(thrown: unknown, indexName: string): boolean {
	if (!(thrown instanceof Error)) return false;
	if ('code' in thrown && thrown.code === UNIQUE_VIOLATION) return thrown.message.includes(indexName);
	return isUniqueViolation(thrown.cause, indexName);
}
