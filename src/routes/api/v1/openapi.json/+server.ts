import { answering, answerJson, onlyMethods } from '#lib/server/api/answering.ts';
import { describeApi } from '#lib/server/api/describeApi.ts';
import type { RequestHandler } from './$types';

/** The description holds nothing of anybody: it is there for all. */
export const GET: RequestHandler = answering(async ({ url }) => answerJson(describeApi(url.origin)));

export const fallback: RequestHandler = onlyMethods('GET');
