import { tokenRequestSchema } from '#lib/contracts/materials.ts';
import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { readBody } from '#lib/server/api/readBody.ts';
import { Refusal } from '#lib/server/api/refusal.ts';
import { checkPassphrase } from '#lib/server/checkPassphrase.ts';
import { can } from '#lib/server/permissions.ts';
import * as tokens from '#lib/server/repositories/tokens.ts';
import type { RequestHandler } from './$types';

const SMALL_BODY_BYTES = 16 * 1024;

export const POST: RequestHandler = answering(async ({ request, getClientAddress }) => {
	const { email, password, label } = await readBody(request, tokenRequestSchema, SMALL_BODY_BYTES);
	const verdict = await checkPassphrase({ email, passphrase: password, address: getClientAddress() });
	if (!verdict.ok && verdict.reason === 'wait') {
		throw new Refusal(429, 'too-many-attempts', verdict.message, { headers: { 'retry-after': String(verdict.waitSeconds) } });
	}
	if (!verdict.ok) throw new Refusal(401, 'wrong-passphrase', verdict.message);
	const { user } = verdict.person;
	const access = await can(user, 'create', { account: user.id });
	return answerJson({ token: await tokens.create(access, label) }, 201);
});

export const fallback: RequestHandler = onlyMethods('POST');
