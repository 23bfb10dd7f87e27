import { fail, redirect } from '@sveltejs/kit';
import { registerForm } from '#lib/contracts/accountForms.ts';
import { parseForm } from '#lib/server/parseForm.ts';
import { hashPassphrase, passphraseFault } from '#lib/server/passphrase.ts';
import { takeTurn } from '#lib/server/rateLimit.ts';
import * as users from '#lib/server/repositories/users.ts';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = ({ locals }) => {
	if (locals.user !== null) redirect(303, '/studies');
};

export const actions: Actions = {
	/** The answer is the same, and takes the same time, whether the address was free or not. */
	default: async ({ request, getClientAddress }) => {
		const form = await parseForm(request, registerForm);
		if (!form.ok) return fail(400, { values: form.values, faults: form.faults });
		const { name, email, passphrase } = form.value;
		const fault = passphraseFault(passphrase, [name, email]);
		const values = { name, email };
		if (fault !== null) return fail(400, { values, faults: { passphrase: fault } });
		const turn = await takeTurn({ register: getClientAddress() });
		if (!turn.ok) return fail(429, { values, faults: { form: turn.message } });
		await users.register({ name, email, passphraseHash: await hashPassphrase(passphrase) });
		redirect(303, '/sign-in?registered');
	}
};
