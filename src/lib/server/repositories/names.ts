import { and, desc, eq } from 'drizzle-orm';
import { matchNames, type NameMatching, type NameRow } from '#lib/analysis/names/matchNames.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import { remark } from '#lib/remarks/remark.ts';
import { personOf, studyOf, type Access } from '#lib/server/access.ts';
import { db, transaction } from '#lib/server/db/client.ts';
import { nameDecisions, users } from '#lib/server/db/schema.ts';
import * as logBook from './logBook.ts';
import * as overlapRuns from './overlapRuns.ts';
import { within } from './scope.ts';
import * as studies from './studies.ts';
import * as treeSets from './treeSets.ts';

/** What a person chose about one name of the data. */
export type NameDecision = {
	/** name in the data */
	readonly from: string;
	/** tip label; null leaves the species out */
	readonly to: string | null;
	readonly why: string;
};
export type CurrentDecision = NameDecision & { readonly decidedBy: string; readonly decidedAt: string };

/** The decisions in force, in the order of the names: for each name the newest one, unless it was withdrawn. */
export async function current(access: Access): Promise<CurrentDecision[]> {
	const rows = await db()
		.selectDistinctOn([nameDecisions.fromName], {
			from: nameDecisions.fromName,
			to: nameDecisions.toTip,
			why: nameDecisions.why,
			withdrawn: nameDecisions.withdrawn,
			decidedBy: users.name,
			decidedAt: nameDecisions.createdAt
		})
		.from(nameDecisions)
		.innerJoin(users, eq(users.id, nameDecisions.decidedBy))
		.where(within(access, nameDecisions.studyId))
		.orderBy(nameDecisions.fromName, desc(nameDecisions.id));
	return rows
		.filter((row) => !row.withdrawn)
		.map(({ from, to, why, decidedBy, decidedAt }) => ({ from, to, why, decidedBy, decidedAt: decidedAt.toISOString() }));
}

/** Everything ever decided or withdrawn about one name, newest first. */
export async function history(access: Access, from: string): Promise<(CurrentDecision & { withdrawn: boolean })[]> {
	const rows = await db()
		.select({
			from: nameDecisions.fromName,
			to: nameDecisions.toTip,
			why: nameDecisions.why,
			withdrawn: nameDecisions.withdrawn,
			decidedBy: users.name,
			decidedAt: nameDecisions.createdAt
		})
		.from(nameDecisions)
		.innerJoin(users, eq(users.id, nameDecisions.decidedBy))
		.where(and(within(access, nameDecisions.studyId), eq(nameDecisions.fromName, from)))
		.orderBy(desc(nameDecisions.id));
	return rows.map((row) => ({ ...row, decidedAt: row.decidedAt.toISOString() }));
}

type Decided = Omit<NameDecision, 'why'> & { readonly why?: string | undefined };

/** Adds decisions; one that already stands word for word is not written again. */
export function decide(access: Access, decisions: readonly Decided[]): Promise<void> {
	return transaction(async () => {
		const standing = new Map((await current(access)).map((decision) => [decision.from, decision]));
		const fresh = decisions.filter(({ from, to, why = '' }) => {
			const held = standing.get(from);
			return held === undefined || held.to !== to || held.why !== why;
		});
		await write(access, fresh, false);
	});
}

/** An undone decision stays in the history: a withdrawal is written after it. */
export function withdraw(access: Access, names: readonly string[]): Promise<void> {
	return transaction(async () => {
		const undone = (await current(access)).filter((decision) => names.includes(decision.from));
		await write(access, undone, true);
	});
}

/** Afterwards exactly these decisions are in force. */
export function replaceAll(access: Access, decisions: readonly Decided[]): Promise<void> {
	return transaction(async () => {
		const wanted = new Set(decisions.map((decision) => decision.from));
		const unwanted = (await current(access)).filter((decision) => !wanted.has(decision.from));
		await write(access, unwanted, true);
		await decide(access, decisions);
	});
}

async function write(access: Access, decisions: readonly Decided[], withdrawn: boolean): Promise<void> {
	if (decisions.length === 0) return;
	const shared = { studyId: studyOf(access), decidedBy: personOf(access), withdrawn };
	const rows = decisions.map(({ from, to, why = '' }) => ({ ...shared, fromName: from, toTip: to, why }));
	await insertRows(rows);
	await studies.touch(access);
	const action = withdrawn ? 'name.withdrawn' : 'name.decided';
	await logBook.append(access, { action, detail: { decisions: decisions.map(({ from, to }) => ({ from, to })) } });
}

/** A statement holds at most 65,535 parameters; these rows have 5 each. */
const ROWS_AT_ONCE = 1000;

async function insertRows(rows: readonly (typeof nameDecisions.$inferInsert)[]): Promise<void> {
	for (let from = 0; from < rows.length; from += ROWS_AT_ONCE) {
		await db()
			.insert(nameDecisions)
			.values(rows.slice(from, from + ROWS_AT_ONCE));
	}
}

/** Which materials are compared; without an id, the newest of the study. */
export type Compared = { readonly treeSet?: string; readonly overlapRun?: string };

/**
 * Tips of a tree set against species of a run under the decisions in force; null until both are there. Materials without
 * a single name in common are told in the same form, since a person can decide even then.
 */
export async function matching(access: Access, { treeSet, overlapRun }: Compared = {}): Promise<NameMatching | null> {
	const trees = treeSet === undefined ? (await treeSets.list(access))[0] : await treeSets.find(access, treeSet);
	const run = overlapRun === undefined ? (await overlapRuns.list(access))[0] : await overlapRuns.findListed(access, overlapRun);
	if (trees == null || run == null) return null;
	const { tips } = trees;
	const { species } = run;
	try {
		return matchNames({ tips, species, decisions: await current(access) });
	} catch (thrown) {
		if (!(thrown instanceof InputError)) throw thrown;
		return noneShared({ tips, species }, thrown);
	}
}

type Names = { readonly tips: readonly string[]; readonly species: readonly string[] };

function noneShared({ tips, species }: Names, { code, message, where }: InputError): NameMatching {
	const inData = species.map((name): NameRow => ({
		species: name,
		kind: 'only-in-data',
		reason: 'no tip is spelled like it',
		settled: false
	}));
	const inTree = tips.map((name): NameRow => ({
		tip: name,
		kind: 'only-in-tree',
		reason: 'no species is spelled like it',
		settled: false
	}));
	const byKind = { exact: 0, tidied: 0, probable: 0, twice: 0, 'only-in-tree': tips.length, 'only-in-data': species.length };
	return {
		rows: [...inData, ...inTree],
		pairs: [],
		dropped: [
			...species.map((name) => ({ name, in: 'data' as const, why: 'no tip is spelled like it' })),
			...tips.map((name) => ({ name, in: 'tree' as const, why: 'no species is spelled like it' }))
		],
		counts: { tips: tips.length, species: species.length, pairs: 0, open: tips.length + species.length, byKind },
		sentence: message,
		remarks: [remark('settle', code, message, where)]
	};
}
