import * as studies from '#lib/server/repositories/studies.ts';
import type { PageServerLoad } from './$types';
import { livePlate } from './livePlate.server.ts';

export const load: PageServerLoad = async ({ locals }) => {
	const [example] = await studies.listExamples();
	const live = await livePlate(locals.user);
	return { live, example: live?.study.id ?? example?.id ?? null };
};
