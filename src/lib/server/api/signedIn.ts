import type { SignedInUser } from '#lib/contracts/user.ts';
import { Refusal } from './refusal.ts';

/** @throws {Refusal} 401 without a session or token */
export function signedIn(user: SignedInUser | null): SignedInUser {
	if (user !== null) return user;
	throw new Refusal(401, 'not-signed-in', 'Sign in first, or send a token: Authorization: Bearer <token>.', {
		headers: { 'www-authenticate': 'Bearer' }
	});
}
