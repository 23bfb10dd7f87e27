import { error, redirect } from '@sveltejs/kit';
import { ROLES, type Role, type SignedInUser } from '#lib/contracts/user.ts';
import type { Access, AccessObject, Action } from './access.ts';
import * as places from './repositories/access.ts';
import * as dependents from './repositories/dependents.ts';
import * as logBook from './repositories/logBook.ts';
import { askedFrom } from './requestScope.ts';

export type { Access } from './access.ts';

const OWN_ALONE =
	'As analyst you can delete and bring back what you made yourself, as long as nothing rests on it. For the rest it takes the role lead.';
const NOT_THERE = 'Nothing at this address, or it is not yours to see.';

type ObjectKind = 'lab' | 'study' | 'account';

/** The one table of permissions: the lowest role that may. What lies in a study is under the rules of the study. */
export const LOWEST_ROLE: Readonly<Record<ObjectKind, Readonly<Partial<Record<Action, Role>>>>> = {
	lab: { read: 'reader', create: 'analyst', change: 'lead', delete: 'lead', restore: 'lead', members: 'lead' },
	study: {
		read: 'reader',
		comment: 'reader',
		download: 'reader',
		create: 'analyst',
		change: 'analyst',
		run: 'analyst',
		share: 'analyst',
		delete: 'lead',
		restore: 'lead',
		signOff: 'lead',
		unlock: 'lead',
		members: 'lead'
	},
	/** a person leads their own account and nobody else's */
	account: { read: 'lead', create: 'lead', change: 'lead', delete: 'lead' }
};

/**
 * The lowest role for what the person made in a study, as long as nothing rests on it; decision 0014 tells why. What is not
 * named here, and the study itself, is under the table above.
 */
const LOWEST_ROLE_FOR_OWN: Readonly<Partial<Record<Action, Role>>> = { delete: 'analyst', restore: 'analyst' };

/** What anybody may do with an example study, with or without an account. */
export const OPEN_TO_VISITORS: ReadonlySet<Action> = new Set<Action>(['read', 'download']);

const DOING: Readonly<Record<Action, string>> = {
	read: 'read it',
	comment: 'comment on it',
	download: 'download from it',
	create: 'add to it',
	change: 'change it',
	run: 'run analyses in it',
	share: 'share it',
	delete: 'delete from it',
	restore: 'bring back what was deleted',
	signOff: 'sign it off',
	unlock: 'unlock it',
	members: 'manage its members'
};

export function mayRole(role: Role, action: Action, kind: ObjectKind): boolean {
	const lowest = LOWEST_ROLE[kind][action];
	return isAtLeast(role, lowest);
}

function isAtLeast(role: Role, lowest: Role | undefined): boolean {
	return lowest !== undefined && ROLES.indexOf(role) >= ROLES.indexOf(lowest);
}

type Part = { readonly isOwn: boolean; /** something that stands rests on it */ readonly isUsed: boolean };

/** The same for one part of a study, where it matters who made it. */
export function mayRoleOnPart(role: Role, action: Action, { isOwn, isUsed }: Part): boolean {
	if (mayRole(role, action, 'study')) return true;
	// Bringing something back takes nothing from whatever rests on it.
	return isOwn && (action === 'restore' || !isUsed) && isAtLeast(role, LOWEST_ROLE_FOR_OWN[action]);
}

/**
 * The one place that decides. Roles and membership are read from the database at every call, so a change holds at once.
 *
 * Throws SvelteKit's errors: 404 when it is not there, deleted (except to restore) or in a lab of others, so that an id
 * tells nothing; 403 with a sentence when the person's role is too low; 401 without a session (a page leads to the
 * sign-in form instead).
 */
export async function can(user: SignedInUser | null, action: Action, object: AccessObject): Promise<Access> {
	if ('account' in object) return canOnAccount(user, action, object.account);
	const place = await places.find(object, { user: user?.id ?? null, deleted: action === 'restore' });
	const isOpen = place?.isExample === true && !place.isDeleted;
	if (place !== null && isOpen && OPEN_TO_VISITORS.has(action) && place.role === null) {
		return { userId: user?.id ?? null, labId: place.labId, studyId: place.studyId, role: 'visitor' };
	}
	if (user === null) return askToSignIn();
	if (place === null || (place.role === null && !isOpen)) return refuse(user, { action, object, place: null });
	const kind: ObjectKind = 'lab' in object ? 'lab' : 'study';
	if (place.role === null) return refuse(user, { action, object, place });
	const isAllowed = mayRole(place.role, action, kind) || (await mayAsMaker(user, { action, object, place }));
	if (!isAllowed) return refuse(user, { action, object, place });
	return { userId: user.id, labId: place.labId, studyId: place.studyId, role: place.role };
}

async function canOnAccount(user: SignedInUser | null, action: Action, account: string): Promise<Access> {
	if (user === null) return askToSignIn();
	const object = { account };
	if (user.id !== account || !mayRole('lead', action, 'account')) return refuse(user, { action, object, place: null });
	return { userId: user.id, labId: null, studyId: null, role: 'lead' };
}

type Tried = { readonly action: Action; readonly object: AccessObject; readonly place: places.Place };

async function mayAsMaker(user: SignedInUser, { action, object, place }: Tried): Promise<boolean> {
	if (!isPart(object) || place.role === null || place.madeBy !== user.id) return false;
	if (LOWEST_ROLE_FOR_OWN[action] === undefined) return false;
	return mayRoleOnPart(place.role, action, { isOwn: true, isUsed: await dependents.isUsed(object) });
}

function askToSignIn(): never {
	const asked = askedFrom();
	if (asked !== null && !asked.isApi) redirect(303, `/sign-in?next=${encodeURIComponent(asked.path)}`);
	error(401, 'Sign in first, or send a token: Authorization: Bearer <token>.');
}

type Refusal = { action: Action; object: AccessObject; place: places.Place | null };

async function refuse(user: SignedInUser, { action, object, place }: Refusal): Promise<never> {
	await logBook.append(
		{ userId: user.id, labId: place?.labId ?? null, studyId: place?.studyId ?? null },
		{ action: 'access.refused', detail: { tried: action, ...object } }
	);
	if (place === null) error(404, NOT_THERE);
	if (place.role === null)
		error(403, `An example study is there to read and download; you cannot ${DOING[action]}. Copy it to work with it.`);
	if (isPart(object) && isAtLeast(place.role, LOWEST_ROLE_FOR_OWN[action])) error(403, OWN_ALONE);
	const lowest = LOWEST_ROLE['lab' in object ? 'lab' : 'study'][action];
	const needed = lowest === undefined ? '' : ` It takes the role ${lowest}; a lead of the lab can change roles.`;
	error(403, `As ${place.role} you cannot ${DOING[action]}.${needed}`);
}

function isPart(object: AccessObject): object is dependents.StudyPart {
	return !('account' in object || 'lab' in object || 'study' in object);
}
