import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = ({ locals }) => ({
	person: locals.user === null ? null : { name: locals.user.name, ownLab: locals.user.ownLab }
});
