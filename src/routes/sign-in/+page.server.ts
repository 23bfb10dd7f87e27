import { fail, redirect } from '@sveltejs/kit';
import { signInForm } from '#lib/contracts/accountForms.ts';
import { startSession } from '#lib/server/auth.ts';
import { checkPassphrase } from '#lib/server/checkPassphrase.ts';
import { runtime } from '#lib/server/heldRuntime.ts';
import { parseForm } from '#lib/server/parseForm.ts';
import { safeNext } from '#lib/server/safeNext.ts';
import { REGISTERED } from '../register/registered.ts';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = ({ locals, url, cookies }) => {
	const next = safeNext(url.searchParams.get('next'), url.origin);
	if (locals.user !== null) redirect(303, next);
	return {
		next,
		isDemo: runtime().isDemo,
		email: cookies.get(REGISTERED) ?? '',
		justRegistered: url.searchParams.has('registered'),
		justChanged: url.searchParams.has('changed')
	};
};

export const actions: Actions = {
	default: async (event) => {
		const form = await parseForm(event.request, signInForm);
		if (!form.ok) return fail(400, { email: form.values['email'] ?? '', faults: form.faults, message: null });
		const { email, passphrase, next } = form.value;
		const verdict = await checkPassphrase({ email, passphrase, address: event.getClientAddress() });
		if (!verdict.ok) {
			return fail(verdict.reason === 'wait' ? 429 : 400, { email, faults: {}, message: verdict.message });
		}
		event.cookies.delete(REGISTERED, { path: '/sign-in' });
		await startSession(event, verdict.person);
		redirect(303, safeNext(next, event.url.origin));
	}
};
