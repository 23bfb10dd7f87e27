import { randomBytes } from 'node:crypto';
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

const SECRET_BYTES = 32;

/** The secret that signs sessions: the one given, else one made at the first start and kept in the data folder. */
export function keptSecret(dataFolder: string, given: string | null): string {
	if (given !== null) return given;
	const path = join(dataFolder, 'auth-secret');
	try {
		writeFileSync(path, randomBytes(SECRET_BYTES).toString('base64url'), { mode: 0o600, flag: 'wx' });
	} catch (cause) {
		if (!(cause instanceof Error && 'code' in cause && cause.code === 'EEXIST')) throw cause;
	}
	const secret = readFileSync(path, 'utf8').trim();
	if (secret.length < SECRET_BYTES)
		throw new Error(
			`Expected a secret of at least ${SECRET_BYTES} characters in ${path}; delete the file to have a new one made.`
		);
	return secret;
}
