import Credentials from '@auth/core/providers/credentials';
import { SvelteKitAuth, type SvelteKitAuthConfig } from '@auth/sveltekit';
import { isRedirect, type RequestEvent } from '@sveltejs/kit';
import { randomUUID } from 'node:crypto';
import { z } from 'zod';
import { runtime } from './heldRuntime.ts';
import { describeError, log } from './log.ts';
import type { SessionHolder } from './repositories/users.ts';

const HOUR_SECONDS = 3_600;
/** A session that nobody uses for this long ends. */
const IDLE_SECONDS = 12 * HOUR_SECONDS;
/** Every session ends this long after sign-in, used or not. */
const ABSOLUTE_SECONDS = 14 * 24 * HOUR_SECONDS;

/** What a signed session cookie says. Whether it still holds is asked of the database at every request. */
const claimsSchema = z.object({ sub: z.string(), sessionVersion: z.number(), startedAt: z.number() });
export type SessionClaims = { readonly userId: string; readonly sessionVersion: number };

const ticketSchema = z.object({ ticket: z.string() });

/**
 * Passphrases are checked by `checkPassphrase`, with its delays. Auth.js only sees a ticket, good once and within the
 * same request, so nobody can go round the delays by posting to its own address.
 */
const tickets = new Map<string, SessionHolder>();

const auth = SvelteKitAuth(async (event) => settings(event));

/** The claims of the request's session cookie, renewed for another idle time; null without a valid one. */
export async function readSession(event: RequestEvent): Promise<SessionClaims | null> {
	await auth.handle({ event, resolve: () => new Response() });
	const session = await event.locals.auth();
	const user: unknown = session?.user;
	const parsed = z.object({ id: z.string(), sessionVersion: z.number() }).safeParse(user);
	return parsed.success ? { userId: parsed.data.id, sessionVersion: parsed.data.sessionVersion } : null;
}

/** Starts a session for somebody whose passphrase was right. */
export async function startSession(event: RequestEvent, person: SessionHolder): Promise<void> {
	const ticket = randomUUID();
	tickets.set(ticket, person);
	try {
		await withoutRedirect(() => auth.signIn(withForm(event, { providerId: 'credentials', ticket, redirectTo: '/' })));
	} finally {
		tickets.delete(ticket);
	}
}

/** Removes the session cookie. */
export async function endSession(event: RequestEvent): Promise<void> {
	await withoutRedirect(() => auth.signOut(withForm(event, { redirectTo: '/' })));
}

/** Read at the first request, when the runtime is open: nothing of it is needed to build the site. */
function settings(event: RequestEvent): SvelteKitAuthConfig {
	return {
		secret: runtime().secret,
		// Our own server has already settled the host and the scheme.
		trustHost: true,
		useSecureCookies: event.url.protocol === 'https:',
		session: { strategy: 'jwt', maxAge: IDLE_SECONDS },
		pages: { signIn: '/sign-in', error: '/sign-in' },
		providers: [Credentials({ credentials: { ticket: {} }, authorize: (given) => redeem(given) })],
		callbacks: {
			jwt: ({ token, user }) => {
				if (user !== undefined) Object.assign(token, claimsOf(user));
				return isWithinAbsoluteLimit(token) ? token : null;
			},
			session: ({ session, token }) => {
				const claims = claimsSchema.parse(token);
				return { ...session, user: { id: claims.sub, sessionVersion: claims.sessionVersion } };
			}
		},
		logger: {
			error: (cause) => log('warning', 'sign-in-library', { error: describeError(cause)['error'], kind: cause.name }),
			warn: (code) => log('warning', 'sign-in-library', { kind: code }),
			debug: () => undefined
		}
	};
}

function redeem(given: unknown): { id: string } | null {
	const parsed = ticketSchema.safeParse(given);
	const person = parsed.success ? tickets.get(parsed.data.ticket) : undefined;
	if (person === undefined) return null;
	return Object.assign({ id: person.user.id }, { sessionVersion: person.sessionVersion });
}

function claimsOf(user: object): Record<string, unknown> {
	const { id, sessionVersion } = z.object({ id: z.string(), sessionVersion: z.number() }).parse(user);
	return { sub: id, sessionVersion, startedAt: nowSeconds() };
}

function isWithinAbsoluteLimit(token: unknown): boolean {
	const claims = claimsSchema.safeParse(token);
	return claims.success && nowSeconds() - claims.data.startedAt < ABSOLUTE_SECONDS;
}

function nowSeconds(): number {
	return Math.floor(Date.now() / 1000);
}

/** The library reads its options from a form; this one holds only what we say, not what the person sent. */
function withForm(event: RequestEvent, fields: Record<string, string>): RequestEvent {
	const headers = new Headers(event.request.headers);
	headers.delete('content-length');
	headers.set('content-type', 'application/x-www-form-urlencoded');
	const request = new Request(event.url, { method: 'POST', headers, body: new URLSearchParams(fields) });
	return { ...event, request };
}

/** The library ends with a redirect of its own; where to go is our pages' affair. */
async function withoutRedirect(act: () => unknown): Promise<void> {
	try {
		await act();
	} catch (thrown) {
		if (!isRedirect(thrown)) throw thrown;
	}
}
