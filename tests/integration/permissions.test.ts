import { isHttpError } from '@sveltejs/kit';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Role, SignedInUser } from '#lib/contracts/user.ts';
import { ACTIONS, type AccessObject, type Action } from '#lib/server/access.ts';
import { db } from '#lib/server/db/client.ts';
import { analyses, logEntries, reports, studies } from '#lib/server/db/schema.ts';
import { can } from '#lib/server/permissions.ts';
import * as labs from '#lib/server/repositories/labs.ts';
import * as logBook from '#lib/server/repositories/logBook.ts';
import * as users from '#lib/server/repositories/users.ts';
import { fillStudy, type FilledStudy } from './support/fillStudy.ts';
import { openTestRuntime, type TestRuntime } from './support/openTestRuntime.ts';

type Who = Role | 'stranger' | 'nobody';
type Answer = 'yes' | 401 | 403 | 404;

let runtime: TestRuntime;
let lab = '';
let study: FilledStudy;
let example: FilledStudy;
const people = new Map<Who, SignedInUser | null>([['nobody', null]]);
const person = (who: Who) => people.get(who) ?? null;

async function register(who: Who): Promise<SignedInUser> {
	const id = await users.register({ email: `${who}@lab.example`, name: who, passphraseHash: 'none' });
	const holder = id === null ? null : await users.sessionHolder(id);
	if (holder === null) throw new Error(`Expected to register ${who}.`);
	people.set(who, holder.user);
	return holder.user;
}

async function answer(who: Who, action: Action, object: AccessObject): Promise<Answer> {
	try {
		await can(person(who), action, object);
		return 'yes';
	} catch (thrown) {
		if (!isHttpError(thrown)) throw thrown;
		return thrown.status as Answer;
	}
}

beforeAll(async () => {
	runtime = await openTestRuntime();
	const lead = await register('lead');
	lab = await labs.create({ name: 'Shared lab', lead: lead.id });
	for (const role of ['analyst', 'reader'] as const) await labs.join(lab, (await register(role)).id, role);
	await register('stranger');
	study = await fillStudy({ lab, createdBy: lead.id });
	example = await fillStudy({ lab: lead.ownLab, createdBy: lead.id, isExample: true });
});
afterAll(() => runtime.close());

// The roles of design.md, section 2: reader reads, comments, downloads; analyst also creates, changes, runs, shares;
// lead also members, sign-off, unlock, delete.
const READER: readonly Action[] = ['read', 'comment', 'download'];
const ANALYST: readonly Action[] = [...READER, 'create', 'change', 'run', 'share'];
const MAY: Readonly<Record<Role, readonly Action[]>> = { reader: READER, analyst: ANALYST, lead: ACTIONS };
const OBJECTS = ['study', 'treeSet', 'overlapRun', 'analysis', 'report'] as const;
const objectIn = (filled: FilledStudy, kind: (typeof OBJECTS)[number]) => ({ [kind]: filled[kind] }) as AccessObject;

describe('can, on a study and everything in it', () => {
	for (const kind of OBJECTS) {
		for (const role of ['reader', 'analyst', 'lead'] as const) {
			it(`gives a ${role} what the role allows on a ${kind}, and 403 for the rest`, async () => {
				for (const action of ACTIONS) {
					const expected: Answer = MAY[role].includes(action) ? 'yes' : 403;
					expect([action, await answer(role, action, objectIn(study, kind))]).toEqual([action, expected]);
				}
			});
		}

		it(`hides a ${kind} of another lab: 404 for every action, as for an id that nobody has`, async () => {
			for (const action of ACTIONS) {
				expect(await answer('stranger', action, objectIn(study, kind))).toBe(404);
				expect(await answer('lead', action, { [kind]: 'nothing-here' } as AccessObject)).toBe(404);
			}
		});

		it(`asks for a sign-in first on a ${kind}`, async () => {
			for (const action of ACTIONS) expect(await answer('nobody', action, objectIn(study, kind))).toBe(401);
		});

		it(`opens a ${kind} of an example to everybody for reading and downloading alone`, async () => {
			for (const action of ACTIONS) {
				const isOpen = action === 'read' || action === 'download';
				expect([action, await answer('nobody', action, objectIn(example, kind))]).toEqual([action, isOpen ? 'yes' : 401]);
				expect([action, await answer('stranger', action, objectIn(example, kind))]).toEqual([action, isOpen ? 'yes' : 403]);
			}
		});
	}

	it('tells where the object is and what the person is there', async () => {
		const access = await can(person('analyst'), 'run', { analysis: study.analysis });
		expect(access).toEqual({ userId: person('analyst')?.id, labId: lab, studyId: study.study, role: 'analyst' });
		const visit = await can(null, 'read', { analysis: example.analysis });
		expect(visit).toMatchObject({ userId: null, studyId: example.study, role: 'visitor' });
	});

	it('says in the refusal which role it takes', async () => {
		const refusal = can(person('reader'), 'run', { study: study.study });
		await expect(refusal).rejects.toMatchObject({
			body: { message: 'As reader you cannot run analyses in it. It takes the role analyst; a lead of the lab can change roles.' }
		});
	});

	it('keeps refusals in the log book, with what was tried', async () => {
		await answer('reader', 'signOff', { report: study.report });
		const entries = await logBook.ofStudy(await can(person('lead'), 'read', { study: study.study }));
		expect(entries[0]).toMatchObject({
			action: 'access.refused',
			userId: person('reader')?.id,
			detail: { tried: 'signOff', report: study.report }
		});
	});
});

// Decision 0014. The filled study has one analysis on its materials and one report on the analysis.
describe('can, on what an analyst made', () => {
	const PARTS = ['treeSet', 'overlapRun', 'analysis', 'report'] as const;
	const own = () => fillStudy({ lab, createdBy: person('analyst')?.id ?? '' });
	const remove = async (table: typeof analyses | typeof reports, id: string) =>
		db().update(table).set({ deletedAt: new Date() }).where(eq(table.id, id));
	const mayDelete = async (filled: FilledStudy, who: Who = 'analyst') =>
		Promise.all(PARTS.map((kind) => answer(who, 'delete', objectIn(filled, kind))));

	it('lets them delete it once nothing that stands rests on it', async () => {
		const filled = await own();
		expect(await mayDelete(filled)).toEqual([403, 403, 403, 'yes']);
		await remove(reports, filled.report);
		expect(await mayDelete(filled)).toEqual([403, 403, 'yes', 404]);
		await remove(analyses, filled.analysis);
		expect(await mayDelete(filled)).toEqual(['yes', 'yes', 404, 404]);
	});

	it('lets them bring back what they made, and a lead everything', async () => {
		const filled = await own();
		await remove(reports, filled.report);
		expect(await answer('analyst', 'restore', { report: filled.report })).toBe('yes');
		expect(await answer('lead', 'restore', { report: filled.report })).toBe('yes');
		expect(await answer('reader', 'restore', { report: filled.report })).toBe(403);
	});

	it('keeps the study itself, and what others made, for a lead', async () => {
		const filled = await own();
		expect(await answer('analyst', 'delete', { study: filled.study })).toBe(403);
		expect(await answer('analyst', 'delete', { report: study.report })).toBe(403);
		expect(await mayDelete(filled, 'lead')).toEqual(['yes', 'yes', 'yes', 'yes']);
	});

	it('gives nothing to somebody who is only a reader now', async () => {
		const filled = await fillStudy({ lab, createdBy: person('reader')?.id ?? '' });
		expect(await answer('reader', 'delete', { report: filled.report })).toBe(403);
	});

	it('says in the refusal what an analyst may delete', async () => {
		await expect(can(person('analyst'), 'delete', { report: study.report })).rejects.toMatchObject({
			body: { message: expect.stringContaining('what you made yourself, as long as nothing rests on it') }
		});
	});
});

describe('can, on what was deleted', () => {
	it('hides a deleted part from everything but bringing it back', async () => {
		const other = await fillStudy({ lab, createdBy: person('lead')?.id ?? '' });
		await db().update(analyses).set({ deletedAt: new Date() }).where(eq(analyses.id, other.analysis));
		expect(await answer('lead', 'read', { analysis: other.analysis })).toBe(404);
		expect(await answer('lead', 'restore', { analysis: other.analysis })).toBe('yes');
		expect(await answer('stranger', 'restore', { analysis: other.analysis })).toBe(404);
		expect(await answer('lead', 'read', { study: other.study })).toBe('yes');
	});

	it('hides a deleted study with all its parts, also an example', async () => {
		const other = await fillStudy({ lab, createdBy: person('lead')?.id ?? '', isExample: true });
		await db().update(studies).set({ deletedAt: new Date() }).where(eq(studies.id, other.study));
		for (const kind of OBJECTS) expect(await answer('lead', 'read', objectIn(other, kind))).toBe(404);
		expect(await answer('nobody', 'read', { study: other.study })).toBe(401);
		expect(await answer('lead', 'restore', { study: other.study })).toBe('yes');
		expect(await answer('lead', 'restore', { report: other.report })).toBe(404);
	});
});

describe('can, on a lab and an account', () => {
	// What a lab has to offer: reading, new studies, its settings, members, deletion.
	const LAB: Readonly<Record<Role, readonly Action[]>> = {
		reader: ['read'],
		analyst: ['read', 'create'],
		lead: ['read', 'create', 'change', 'delete', 'restore', 'members']
	};

	it.each(['reader', 'analyst', 'lead'] as const)('gives a %s of the lab what the role allows', async (role) => {
		for (const action of ACTIONS) {
			expect([action, await answer(role, action, { lab })]).toEqual([action, LAB[role].includes(action) ? 'yes' : 403]);
		}
	});

	it('hides a lab from who is no member', async () => {
		for (const action of ACTIONS) expect(await answer('stranger', action, { lab })).toBe(404);
		expect(await answer('nobody', 'read', { lab })).toBe(401);
	});

	it('gives everybody their own account and nobody that of another', async () => {
		const account = person('reader')?.id ?? '';
		expect(await answer('reader', 'change', { account })).toBe('yes');
		expect(await answer('lead', 'read', { account })).toBe(404);
		expect(await answer('nobody', 'read', { account })).toBe(401);
	});

	it('feels a changed role at once', async () => {
		expect(await answer('stranger', 'read', { study: study.study })).toBe(404);
		await labs.join(lab, person('stranger')?.id ?? '', 'reader');
		expect(await answer('stranger', 'read', { study: study.study })).toBe('yes');
	});
});

describe('the log book', () => {
	it('is one unbroken chain', async () => {
		expect(await logBook.firstBrokenEntry()).toBeNull();
	});

	it('refuses to change or delete an entry', async () => {
		await expect(db().update(logEntries).set({ action: 'nothing' })).rejects.toThrow();
		await expect(db().delete(logEntries)).rejects.toThrow();
	});

	it('notices an entry that was not written by the program', async () => {
		const forged = { action: 'exported', detail: {}, previousHash: '0'.repeat(64), hash: 'f'.repeat(64) };
		const [added] = await db().insert(logEntries).values(forged).returning({ id: logEntries.id });
		expect(await logBook.firstBrokenEntry()).toBe(added?.id);
	});
});
