import { studyRequestSchema } from '#lib/contracts/materials.ts';
import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { readBody } from '#lib/server/api/readBody.ts';
import { signedIn } from '#lib/server/api/signedIn.ts';
import { studyAnswer } from '#lib/server/api/studyAnswer.ts';
import { can } from '#lib/server/permissions.ts';
import * as studies from '#lib/server/repositories/studies.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = answering(async ({ locals }) => {
	const user = signedIn(locals.user);
	const access = await can(user, 'read', { account: user.id });
	return answerJson((await studies.list(access)).map(studyAnswer));
});

export const POST: RequestHandler = answering(async ({ request, locals }) => {
	const user = signedIn(locals.user);
	const { title, question, lab } = await readBody(request, studyRequestSchema);
	const access = await can(user, 'create', { lab: lab ?? user.ownLab });
	return answerJson(studyAnswer(await studies.create(access, { title, question })), 201);
});

export const fallback: RequestHandler = onlyMethods('GET', 'POST');
