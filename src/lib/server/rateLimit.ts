import { createHash } from 'node:crypto';
import * as attempts from './repositories/attempts.ts';

/**
 * Waits grow with every attempt and end by themselves: nobody can lock another person out for good. The account's limit
 * holds per address, so a stranger's guesses from elsewhere never delay the owner.
 */
const RULES = {
	/** guesses at one account from one address: 5 free, then 2 s, 4 s, … 15 minutes */
	signIn: { freeCount: 5, firstDelaySeconds: 2, longestDelaySeconds: 900, forgetAfterSeconds: 86_400 },
	/** guesses at any account from one address, where a whole institute may sit: 50 free, then 1 s, 2 s, … 5 minutes */
	signInFromAddress: { freeCount: 50, firstDelaySeconds: 1, longestDelaySeconds: 300, forgetAfterSeconds: 3_600 },
	/** accounts made from one address: a class of 30 in one room is fine */
	register: { freeCount: 30, firstDelaySeconds: 10, longestDelaySeconds: 900, forgetAfterSeconds: 3_600 }
} as const satisfies Record<string, attempts.DelayRule>;
export type LimitedAct = keyof typeof RULES;

export type Turn = { readonly ok: true } | { readonly ok: false; readonly waitSeconds: number; readonly message: string };

/** Takes one turn of every limit that applies; a refused turn counts for nothing and may be tried after the wait. */
export async function takeTurn(limits: Partial<Record<LimitedAct, string>>, now = new Date()): Promise<Turn> {
	for (const [act, rule] of Object.entries(RULES)) {
		const who = limits[act as LimitedAct];
		if (who === undefined) continue;
		const wait = await attempts.take(keyOf(act, who), rule, now);
		if (wait !== null) return { ok: false, waitSeconds: wait, message: `Too many attempts. Try again in ${inWords(wait)}.` };
	}
	return { ok: true };
}

/** After a success the next mistake is the first again. */
export async function forgetTurns(act: LimitedAct, who: string): Promise<void> {
	await attempts.forget(keyOf(act, who));
}

/** Removes counts older than any rule remembers. */
export async function sweepTurns(now = new Date()): Promise<void> {
	await attempts.sweep(new Date(now.getTime() - 86_400_000));
}

/** Hashed: the table of attempts need not hold anybody's address. */
function keyOf(act: string, who: string): string {
	return `${act}:${createHash('sha256').update(who.toLowerCase()).digest('base64url')}`;
}

function inWords(seconds: number): string {
	if (seconds < 60) return seconds === 1 ? '1 second' : `${seconds} seconds`;
	const minutes = Math.ceil(seconds / 60);
	return minutes === 1 ? '1 minute' : `${minutes} minutes`;
}
