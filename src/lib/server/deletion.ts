import type { Access } from './access.ts';
import { mayRoleOnPart } from './permissions.ts';

type Part = { readonly createdBy: string; /** something that stands rests on it */ readonly isUsed: boolean };

/** Whether the person may delete a part of the study, and for an analyst who may not, who can. */
export type Deletion = {
	readonly may: boolean;
	/** a sentence; '' where there is nothing to explain */ readonly instead: string;
};

export function deletionOf(access: Access, part: Part): Deletion {
	const { role } = access;
	if (role === 'visitor' || role === 'system' || role === 'reader') return { may: false, instead: '' };
	const isOwn = part.createdBy === access.userId;
	if (mayRoleOnPart(role, 'delete', { isOwn, isUsed: part.isUsed })) return { may: true, instead: '' };
	return {
		may: false,
		instead: isOwn
			? 'You made it, but something rests on it: a lead can delete it.'
			: 'Whoever made it can delete it while nothing rests on it; a lead can.'
	};
}

/** Of what was deleted, that which the person may bring back. */
export function restorable<Gone extends { readonly createdBy: string }>(access: Access, gone: readonly Gone[]): Gone[] {
	const { role } = access;
	if (role === 'visitor' || role === 'system') return [];
	return gone.filter(({ createdBy }) => mayRoleOnPart(role, 'restore', { isOwn: createdBy === access.userId, isUsed: false }));
}
