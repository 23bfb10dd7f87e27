import type { Access } from './access.ts';

/** For jobs and commands of our own. The name tells whoever reads the code what it is for. */
export function systemAccess(_name: string): Access {
	return { userId: null, labId: null, studyId: null, role: 'system' };
}
