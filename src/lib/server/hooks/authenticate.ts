import type { RequestEvent } from '@sveltejs/kit';
import type { SignedInUser } from '#lib/contracts/user.ts';
import { readSession } from '#lib/server/auth.ts';
import * as tokens from '#lib/server/repositories/tokens.ts';
import * as users from '#lib/server/repositories/users.ts';

/** The token of `Authorization: Bearer <token>`; null without one. */
export function bearerOf(request: Request): string | null {
	return /^Bearer\s+(\S+)\s*$/i.exec(request.headers.get('authorization') ?? '')?.[1] ?? null;
}

/** Who asks: by a token when there is one, then cookies count for nothing; else by the session. */
export async function authenticate(event: RequestEvent, bearer: string | null): Promise<SignedInUser | null> {
	if (bearer !== null) {
		const userId = await tokens.holderOf(bearer);
		return userId === null ? null : ((await users.sessionHolder(userId))?.user ?? null);
	}
	if (!hasSessionCookie(event)) return null;
	const claims = await readSession(event);
	if (claims === null) return null;
	const holder = await users.sessionHolder(claims.userId);
	return holder?.sessionVersion === claims.sessionVersion ? holder.user : null;
}

/** Saves the work of decoding for everybody who is not signed in. */
function hasSessionCookie({ cookies }: RequestEvent): boolean {
	return cookies.getAll().some(({ name }) => name.includes('authjs.session-token'));
}
