import type { Access } from '#lib/server/access.ts';
import type { Covariate } from '#lib/server/repositories/covariateRows.ts';
import * as covariates from '#lib/server/repositories/covariates.ts';
import { notInStudy } from './notInStudy.ts';

/**
 * The covariates that a plan names, in its order.
 * @throws {Refusal} 404 for one that is not in the study
 */
export async function covariatesOf(access: Access, ids: readonly string[]): Promise<Covariate[]> {
	const found = (await covariates.findKept(access, ids)).filter(({ deletedAt }) => deletedAt === null);
	const absent = ids.find((id) => found.every((covariate) => covariate.id !== id));
	if (absent !== undefined) throw notInStudy('covariate', absent);
	return found;
}
