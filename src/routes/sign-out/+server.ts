import { redirect } from '@sveltejs/kit';
import { endSession } from '#lib/server/auth.ts';
import * as logBook from '#lib/server/repositories/logBook.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = () => redirect(303, '/');

export const POST: RequestHandler = async (event) => {
	if (event.locals.user !== null) {
		await logBook.append({ userId: event.locals.user.id, labId: null, studyId: null }, { action: 'account.signed-out' });
	}
	await endSession(event);
	redirect(303, '/');
};
