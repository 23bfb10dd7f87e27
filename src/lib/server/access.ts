import type { Role } from '#lib/contracts/user.ts';

/** Everything a person may try. The table of who may do what is in permissions.ts. */
export const ACTIONS = [
	'read',
	'comment',
	'download',
	'create',
	'change',
	'run',
	'share',
	'delete',
	'restore',
	'signOff',
	'unlock',
	'members'
] as const;
export type Action = (typeof ACTIONS)[number];

/** What they try it on: one id, named for what it is. */
export type AccessObject =
	| { readonly lab: string }
	| { readonly study: string }
	| { readonly treeSet: string }
	| { readonly overlapRun: string }
	| { readonly covariate: string }
	| { readonly nicheTable: string }
	| { readonly analysis: string }
	| { readonly report: string }
	| { readonly account: string };

/** A visitor reads an example study without being a member; the system is a job of our own. */
export type AccessRole = Role | 'visitor' | 'system';

/**
 * Proof that somebody may touch something; every query of a repository takes one and stays inside it.
 * Made only by `can` and `systemAccess`.
 */
export type Access = {
	/** null for a visitor without an account and for the system */
	readonly userId: string | null;
	/** null for an account and for the system */
	readonly labId: string | null;
	/** null for a lab, an account and the system */
	readonly studyId: string | null;
	readonly role: AccessRole;
};

/** @throws {Error} when the access is not to a study: a defect of ours */
export function studyOf(access: Access): string {
	if (access.studyId === null) throw new Error('Expected an access to a study.');
	return access.studyId;
}

/** @throws {Error} when the access is not to a lab: a defect of ours */
export function labOf(access: Access): string {
	if (access.labId === null) throw new Error('Expected an access to a lab.');
	return access.labId;
}

/** @throws {Error} when no person stands behind the access: a defect of ours */
export function personOf(access: Access): string {
	if (access.userId === null) throw new Error('Expected an access of a signed-in person.');
	return access.userId;
}
