import { fail, redirect } from '@sveltejs/kit';
import { registerForm } from '#lib/contracts/accountForms.ts';
import { parseForm } from '#lib/server/parseForm.ts';
import { hashPassphrase, passphraseFault } from '#lib/server/passphrase.ts';
import { takeTurn } from '#lib/server/rateLimit.ts';
import * as users from '#lib/server/repositories/users.ts';
import { REGISTERED } from './registered.ts';
import type { Actions, PageServerLoad } from './$types';

const TEN_MINUTES_S = 600;

/** Where the person wanted to go before they had an account; the sign-in form checks it. */
const nextOf = (url: URL) =>
	url.searchParams.has('next') ? `&next=${encodeURIComponent(url.searchParams.get('next') ?? '')}` : '';

export const load: PageServerLoad = ({ locals }) => {
	if (locals.user !== null) redirect(303, '/studies');
};

export const actions: Actions = {
	/** The answer is the same, and takes the same time, whether the address was free or not. */
	default: async ({ request, cookies, getClientAddress, url }) => {
		const form = await parseForm(request, registerForm);
		if (!form.ok) return fail(400, { values: form.values, faults: form.faults });
		const { name, email, passphrase } = form.value;
		const fault = passphraseFault(passphrase, [name, email]);
		const values = { name, email };
		if (fault !== null) return fail(400, { values, faults: { passphrase: fault } });
		const turn = await takeTurn({ register: getClientAddress() });
		if (!turn.ok) return fail(429, { values, faults: { form: turn.message } });
		await users.register({ name, email, passphraseHash: await hashPassphrase(passphrase) });
		// In a cookie that the sign-in form alone is sent: an address in the address bar ends up in logs and histories.
		cookies.set(REGISTERED, email, {
			path: '/sign-in',
			httpOnly: true,
			sameSite: 'lax',
			secure: url.protocol === 'https:',
			maxAge: TEN_MINUTES_S
		});
		redirect(303, `/sign-in?registered${nextOf(url)}`);
	}
};
