type Level = 'info' | 'warning' | 'error';
type Fields = Readonly<Record<string, unknown>>;

/**
 * Writes one JSON line to standard error. JSON escapes line breaks, so text from outside cannot forge a second entry.
 * Callers pass no secrets: no passphrase, token, cookie or uploaded content.
 */
export function log(level: Level, event: string, fields: Fields = {}): void {
	process.stderr.write(`${JSON.stringify({ at: new Date().toISOString(), level, event, ...fields })}\n`);
}

/** What the log keeps of a thrown value: its text, its stack and what caused it. */
export function describeError(thrown: unknown): Fields {
	if (!(thrown instanceof Error)) return { error: String(thrown) };
	const cause = thrown.cause === undefined ? {} : { cause: describeError(thrown.cause) };
	return { error: thrown.message, stack: thrown.stack, ...cause };
}
