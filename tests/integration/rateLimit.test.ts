import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { db } from '#lib/server/db/client.ts';
import { attempts } from '#lib/server/db/schema.ts';
import { forgetTurns, sweepTurns, takeTurn } from '#lib/server/rateLimit.ts';
import { openTestRuntime, type TestRuntime } from './support/openTestRuntime.ts';

let runtime: TestRuntime;
beforeAll(async () => (runtime = await openTestRuntime()));
afterAll(() => runtime.close());

const NOON = new Date('2026-03-01T12:00:00Z').getTime();
const at = (seconds: number) => new Date(NOON + seconds * 1000);

describe('takeTurn', () => {
	// By hand from the rule: 5 free, then 2 s, 4 s, 8 s, … at most 900 s.
	it('doubles the wait with every attempt after the fifth', async () => {
		for (let attempt = 0; attempt < 5; attempt += 1) expect((await takeTurn({ signIn: 'a' }, at(0))).ok).toBe(true);
		expect(await takeTurn({ signIn: 'a' }, at(0))).toMatchObject({ ok: false, waitSeconds: 2 });
		expect(await takeTurn({ signIn: 'a' }, at(1))).toMatchObject({ ok: false, waitSeconds: 1 });
		expect((await takeTurn({ signIn: 'a' }, at(2))).ok).toBe(true);
		expect(await takeTurn({ signIn: 'a' }, at(2))).toMatchObject({ ok: false, waitSeconds: 4 });
	});

	it('says in words when to try again', async () => {
		for (let attempt = 0; attempt < 5; attempt += 1) await takeTurn({ signIn: 'words' }, at(0));
		expect(await takeTurn({ signIn: 'words' }, at(0))).toMatchObject({ message: 'Too many attempts. Try again in 2 seconds.' });
	});

	it('never lets the wait grow past 15 minutes, so nobody is locked out', async () => {
		let now = 0;
		for (let attempt = 0; attempt < 40; attempt += 1) {
			const turn = await takeTurn({ signIn: 'b' }, at(now));
			if (!turn.ok) expect(turn.waitSeconds).toBeLessThanOrEqual(900);
			now += turn.ok ? 0 : turn.waitSeconds;
		}
		expect((await takeTurn({ signIn: 'b' }, at(now + 900))).ok).toBe(true);
	});

	it('leaves another address alone: a stranger cannot delay the owner', async () => {
		for (let attempt = 0; attempt < 9; attempt += 1) await takeTurn({ signIn: 'ada@lab.example 10.0.0.1' }, at(0));
		expect((await takeTurn({ signIn: 'ada@lab.example 10.0.0.2' }, at(0))).ok).toBe(true);
	});

	it('counts attempts that come all at once', async () => {
		const turns = await Promise.all(Array.from({ length: 20 }, () => takeTurn({ signIn: 'c' }, at(0))));
		expect(turns.filter((turn) => turn.ok)).toHaveLength(5);
	});

	it('begins anew after a success and after a quiet day', async () => {
		for (let attempt = 0; attempt < 6; attempt += 1) await takeTurn({ signIn: 'd' }, at(0));
		await forgetTurns('signIn', 'd');
		for (let attempt = 0; attempt < 5; attempt += 1) expect((await takeTurn({ signIn: 'd' }, at(0))).ok).toBe(true);
		for (let attempt = 0; attempt < 5; attempt += 1) expect((await takeTurn({ signIn: 'd' }, at(86_400))).ok).toBe(true);
	});

	it('keeps no address in the clear and sweeps what no rule remembers', async () => {
		await takeTurn({ signIn: 'ada@lab.example 10.0.0.9' }, at(0));
		const rows = await db().select().from(attempts);
		expect(JSON.stringify(rows)).not.toContain('ada@');
		await sweepTurns(at(3 * 86_400));
		expect(await db().select().from(attempts)).toHaveLength(0);
	});
});
