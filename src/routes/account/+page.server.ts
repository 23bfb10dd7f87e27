import { error, fail, redirect, type RequestEvent } from '@sveltejs/kit';
import { passphraseForm, renameForm, revokeForm, tokenForm } from '#lib/contracts/accountForms.ts';
import type { Action } from '#lib/server/access.ts';
import { endSession } from '#lib/server/auth.ts';
import { parseForm } from '#lib/server/parseForm.ts';
import { hashPassphrase, passphraseFault, verifyPassphrase } from '#lib/server/passphrase.ts';
import { can } from '#lib/server/permissions.ts';
import { forgetTurns, takeTurn } from '#lib/server/rateLimit.ts';
import * as labs from '#lib/server/repositories/labs.ts';
import * as tokens from '#lib/server/repositories/tokens.ts';
import * as users from '#lib/server/repositories/users.ts';
import type { Actions, PageServerLoad } from './$types';

/** A form that was refused says which one, so that its sentence stands beside it. */
const refused = (about: string, message: string, status = 400) => fail(status, { about, message, done: null, newToken: null });
const done = (about: string, sentence: string, newToken: string | null = null) => ({
	about,
	message: null,
	done: sentence,
	newToken
});

const own = (event: Pick<RequestEvent, 'locals'>, action: Action) =>
	can(event.locals.user, action, { account: event.locals.user?.id ?? '' });

export const load: PageServerLoad = async (event) => {
	const access = await own(event, 'read');
	const profile = await users.profile(access);
	if (profile === null) error(404, 'This account is gone.');
	return { profile, labs: await labs.ofPerson(access), tokens: await tokens.list(access) };
};

export const actions: Actions = {
	rename: async (event) => {
		const access = await own(event, 'change');
		const form = await parseForm(event.request, renameForm);
		if (!form.ok) return refused('rename', firstFault(form.faults));
		await users.rename(access, form.value.name);
		return done('rename', 'Your name is changed.');
	},

	passphrase: async (event) => {
		const access = await own(event, 'change');
		const form = await parseForm(event.request, passphraseForm);
		if (!form.ok) return refused('passphrase', firstFault(form.faults));
		const who = `${event.locals.user?.email ?? ''} ${event.getClientAddress()}`;
		const turn = await takeTurn({ signIn: who });
		if (!turn.ok) return refused('passphrase', turn.message, 429);
		if (!(await verifyPassphrase(await users.passphraseHashOf(access), form.value.current))) {
			return refused('passphrase', 'The passphrase you have now is another one. Nothing was changed.');
		}
		await forgetTurns('signIn', who);
		const profile = await users.profile(access);
		const fault = passphraseFault(form.value.passphrase, [profile?.name ?? '', profile?.email ?? '']);
		if (fault !== null) return refused('passphrase', fault);
		await users.changePassphrase(access, await hashPassphrase(form.value.passphrase));
		await endSession(event);
		redirect(303, '/sign-in?changed');
	},

	makeToken: async (event) => {
		const access = await own(event, 'create');
		const form = await parseForm(event.request, tokenForm);
		if (!form.ok) return refused('token', firstFault(form.faults));
		return done('token', 'Copy the token now: it is shown only this once.', await tokens.create(access, form.value.label));
	},

	revokeToken: async (event) => {
		const access = await own(event, 'delete');
		const form = await parseForm(event.request, revokeForm);
		const isRevoked = form.ok && (await tokens.revoke(access, form.value.token));
		return isRevoked
			? done('token', 'The token is revoked; scripts that use it are refused from now on.')
			: refused('token', 'That token is gone already.');
	},

	endSessions: async (event) => {
		await users.endSessions(await own(event, 'change'));
		await endSession(event);
		redirect(303, '/sign-in');
	}
};

function firstFault(faults: Readonly<Record<string, string>>): string {
	return Object.values(faults)[0] ?? 'The form could not be read.';
}
