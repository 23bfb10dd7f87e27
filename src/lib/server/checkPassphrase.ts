import { verifyPassphrase } from './passphrase.ts';
import { forgetTurns, takeTurn } from './rateLimit.ts';
import * as logBook from './repositories/logBook.ts';
import * as users from './repositories/users.ts';

export type Attempt = {
	readonly email: string;
	readonly passphrase: string;
	/** network address of who asks */
	readonly address: string;
};

export type Verdict =
	| { readonly ok: true; readonly person: users.SessionHolder }
	| { readonly ok: false; readonly reason: 'wrong' | 'wait'; readonly message: string; readonly waitSeconds: number };

/** The same words for an unknown address and a wrong passphrase: neither tells who has an account. */
const WRONG = 'Address and passphrase do not go together. Capitals and blanks count in the passphrase.';
const NOBODY = { userId: null, labId: null, studyId: null };

/** The one way in with an address and a passphrase, for the page and for the API: with delays, and both outcomes logged. */
export async function checkPassphrase({ email, passphrase, address }: Attempt): Promise<Verdict> {
	const signIn = `${email.trim()} ${address}`;
	const turn = await takeTurn({ signIn, signInFromAddress: address });
	if (!turn.ok) return { ...turn, reason: 'wait' };
	const known = await users.credentialsOf(email.trim());
	const isRight = await verifyPassphrase(known?.passphraseHash ?? null, passphrase);
	const person = known !== null && isRight ? await users.sessionHolder(known.id) : null;
	if (person === null) {
		await logBook.append({ ...NOBODY, userId: known?.id ?? null }, { action: 'account.sign-in-refused' });
		return { ok: false, reason: 'wrong', message: WRONG, waitSeconds: 0 };
	}
	await forgetTurns('signIn', signIn);
	await logBook.append({ ...NOBODY, userId: person.user.id }, { action: 'account.signed-in' });
	return { ok: true, person };
}
