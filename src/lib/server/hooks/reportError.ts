import type { HandleServerError } from '@sveltejs/kit';
import { randomUUID } from 'node:crypto';
import { describeError, log } from '#lib/server/log.ts';
import { askedFrom } from '#lib/server/requestScope.ts';

/** A defect of ours: the person gets a reference, the log gets the rest. An address that does not exist is no defect. */
export const reportError: HandleServerError = ({ error, event, status, message }) => {
	if (status === 404) return { message: 'Nothing at this address.' };
	if (status < 500) return { message };
	const reference = askedFrom()?.reference ?? randomUUID();
	log('error', 'request-failed', { reference, method: event.request.method, route: event.route.id, ...describeError(error) });
	return { message: `Something went wrong on our side. Your data are as they were. Reference ${reference}.`, reference };
};
