import type { PageServerLoad } from './$types';
import { LIMITS } from './limits.ts';

/** The figures are read here, so that the rules they come from stay out of the browser. */
export const load: PageServerLoad = () => ({ limits: LIMITS });
