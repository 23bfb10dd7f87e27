import { and, eq, isNull, type SQL } from 'drizzle-orm';
import type { Role } from '#lib/contracts/user.ts';
import type { AccessObject } from '#lib/server/access.ts';
import { db } from '#lib/server/db/client.ts';
import {
	analyses,
	covariates,
	labs,
	memberships,
	nicheTables,
	overlapRuns,
	reports,
	studies,
	treeSets
} from '#lib/server/db/schema.ts';

/** Where an object is, and what the asking person is there. */
export type Place = {
	readonly labId: string;
	readonly studyId: string | null;
	/** null when the person is no member, or nobody is signed in */
	readonly role: Role | null;
	/** who made a part of a study; null for a lab and for a study, which is the lab’s */
	readonly madeBy: string | null;
	readonly isExample: boolean;
	readonly isDeleted: boolean;
};

type Asking = {
	readonly user: string | null;
	/** also look among what was deleted; a part of a deleted study stays hidden until the study is back */
	readonly deleted: boolean;
};
type StudyPart = Exclude<AccessObject, { readonly account: string } | { readonly lab: string }>;

/** The tables whose rows belong to a study. */
const PARTS = {
	treeSet: treeSets,
	overlapRun: overlapRuns,
	covariate: covariates,
	nicheTable: nicheTables,
	analysis: analyses,
	report: reports
};

export async function find(object: Exclude<AccessObject, { readonly account: string }>, asking: Asking): Promise<Place | null> {
	if ('lab' in object) return findLab(object.lab, asking.user);
	const found = await findInStudy(object, asking);
	if (found === undefined) return null;
	return { ...found, isDeleted: found.studyDeleted !== null || found.partDeleted !== null };
}

async function findLab(lab: string, user: string | null): Promise<Place | null> {
	const [row] = await db()
		.select({ labId: labs.id, role: memberships.role })
		.from(labs)
		.leftJoin(memberships, memberOf(user))
		.where(eq(labs.id, lab));
	return row === undefined ? null : { ...row, studyId: null, madeBy: null, isExample: false, isDeleted: false };
}

async function findInStudy(object: StudyPart, { user, deleted }: Asking) {
	if ('study' in object) {
		const alive = deleted ? undefined : isNull(studies.deletedAt);
		const [row] = await db()
			.select({ ...placeColumns, partDeleted: studies.deletedAt })
			.from(studies)
			.innerJoin(labs, eq(labs.id, studies.labId))
			.leftJoin(memberships, memberOf(user))
			.where(and(eq(studies.id, object.study), alive));
		return row === undefined ? undefined : { ...row, madeBy: null };
	}
	const [kind, id] = partOf(object);
	const part = PARTS[kind];
	const [row] = await db()
		.select({ ...placeColumns, madeBy: part.createdBy, partDeleted: part.deletedAt })
		.from(part)
		.innerJoin(studies, eq(studies.id, part.studyId))
		.innerJoin(labs, eq(labs.id, studies.labId))
		.leftJoin(memberships, memberOf(user))
		.where(and(eq(part.id, id), isNull(studies.deletedAt), deleted ? undefined : isNull(part.deletedAt)));
	return row;
}

const placeColumns = {
	labId: studies.labId,
	studyId: studies.id,
	role: memberships.role,
	isExample: studies.isExample,
	studyDeleted: studies.deletedAt
};

function partOf(object: Exclude<StudyPart, { readonly study: string }>): [keyof typeof PARTS, string] {
	if ('treeSet' in object) return ['treeSet', object.treeSet];
	if ('overlapRun' in object) return ['overlapRun', object.overlapRun];
	if ('covariate' in object) return ['covariate', object.covariate];
	if ('nicheTable' in object) return ['nicheTable', object.nicheTable];
	if ('analysis' in object) return ['analysis', object.analysis];
	return ['report', object.report];
}

function memberOf(user: string | null): SQL | undefined {
	// No person has an empty id, so nobody signed in is a member of nothing.
	return and(eq(memberships.labId, labs.id), eq(memberships.userId, user ?? ''));
}
